using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>A remark.</summary>
/// <param name="Id">Request.</param>
/// <param name="Pointer">JSON pointer of the parameter, or null for the whole request.</param>
/// <param name="Text">1 to 4,000 characters.</param>
public sealed record NewComment(long Id, string? Pointer, string? Text);

/// <summary>Adds a remark to a request or to one of its parameters. Remarks are never changed.</summary>
/// <param name="commands">Runs it.</param>
public sealed class AddComment(Commands commands)
{
    private static readonly CommandKind Kind = new("add-comment", Rule, NeedsKey: true);

    /// <summary>Who may: anybody signed in with a session.</summary>
    public static RoleRule Rule => RoleRule.Own;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="comment">The remark.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<CommentView>> RunAsync(Caller caller, NewComment comment, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Kind, Proposals.Subject(comment.Id), comment, command => AddAsync(command, comment), cancellationToken);

    private static async Task<Outcome<CommentView>> AddAsync(Command command, NewComment comment)
    {
        if (string.IsNullOrWhiteSpace(comment.Text))
            return Invalid.Field("/text", comment.Text, "1 to 4,000 characters", "The remark is empty.");
        if (Proposals.Text(comment.Text, "/text", 4000, "1 to 4,000 characters") is { } fault)
            return fault;
        if (comment.Pointer is { } pointer && (pointer.Length > 400 || (pointer.Length > 0 && pointer[0] != '/')))
            return Invalid.Field("/pointer", pointer, "a JSON pointer of at most 400 characters", "The remark points nowhere.");
        if (await command.Stores.ChangeRequests.FindAsync(comment.Id, forUpdate: true, command.Cancellation) is null)
            return Proposals.Missing(comment.Id);
        var view = new CommentView(0, command.Actor.Name, command.Actor.DisplayName, comment.Pointer, comment.Text, command.Now);
        return view with { Number = await command.Stores.ChangeRequests.AddCommentAsync(comment.Id, view, command.Cancellation) };
    }
}
