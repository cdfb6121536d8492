namespace ProtoLedger.Application.ChangeRequests;

/// <summary>States of a change request.</summary>
public enum ChangeRequestState
{
    /// <summary>Written by its author, not yet shown for decision.</summary>
    Draft,

    /// <summary>Waits for its run, its signatures and its decision.</summary>
    UnderReview,

    /// <summary>Signed by all who must; the next version exists.</summary>
    Approved,

    /// <summary>Refused by a reviewer, with a reason.</summary>
    Declined,

    /// <summary>Taken back by its author.</summary>
    Withdrawn,
}

/// <summary>The states in words.</summary>
public static class ChangeRequestStates
{
    private static readonly string[] Words = ["draft", "under review", "approved", "declined", "withdrawn"];

    /// <summary>All words, in the order of the states.</summary>
    public static IReadOnlyList<string> All => Words;

    /// <summary>The word that API, pages and tables use.</summary>
    /// <param name="state">State.</param>
    public static string ToWord(this ChangeRequestState state) => Words[(int)state];

    /// <summary>The state of a word.</summary>
    /// <param name="word">One of the five.</param>
    /// <exception cref="ArgumentException">Any other word.</exception>
    public static ChangeRequestState FromWord(string word) =>
        Array.IndexOf(Words, word) is >= 0 and var index
            ? (ChangeRequestState)index
            : throw new ArgumentException($"'{word}' is no state of a change request.", nameof(word));
}
