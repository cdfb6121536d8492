using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Protocols.Store;

namespace ProtoLedger.Application.Importing;

/// <summary>Makes accounts of the people of a demonstration, and enrols those who sign.</summary>
/// <param name="accounts">Makes accounts.</param>
/// <param name="enrolment">Enrols signers.</param>
public sealed class PrepareDemo(KeepAccounts accounts, EnrolSigner enrolment)
{
    private static readonly string[] Signers = [Roles.Physicist, Roles.Radiologist, Roles.LeadTechnologist];

    /// <summary>Whether people of a role sign.</summary>
    /// <param name="role">Role.</param>
    public static bool Signs(string role) => Signers.Contains(role);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.SystemOnly;

    /// <summary>Runs it; people who have an account already are left as they are.</summary>
    /// <param name="people">People with their roles.</param>
    /// <param name="password">Password of each account.</param>
    /// <param name="passphrase">Signing passphrase of each signer.</param>
    /// <param name="cancellationToken">Stops it.</param>
    /// <returns>Accounts made.</returns>
    public async Task<IReadOnlyList<AccountView>> RunAsync(
        IReadOnlyList<StorePerson> people, string password, string passphrase, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(people);
        var made = new List<AccountView>();
        foreach (var person in people)
        {
            var account = new NewAccount(person.Name, person.DisplayName, [person.Role], password, Demo: true);
            var created = await accounts.CreateAsync(Caller.System, account, cancellationToken);
            if (created.Refusal is Conflict)
                continue;
            made.Add(Demand(created));
            if (Signs(person.Role))
                Demand(await enrolment.RunAsync(Caller.System, new Enrolment(person.Name, passphrase), cancellationToken));
        }

        return made;
    }

    private static T Demand<T>(Outcome<T> outcome) =>
        outcome.Succeeded ? outcome.Value : throw new InvalidOperationException(outcome.Refusal.Detail);
}
