using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Importing;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Protocols.Store;

namespace ProtoLedger.Server.Hosting;

/// <summary>Makes the people of the demonstration and says how to sign in as them.</summary>
internal sealed class DemoPeople(PrepareDemo prepare, KeepAccounts accounts, EnrolSigner enrolment, ServerOptions options)
{
    /// <summary>Makes who is missing, applies changed secrets, and returns the lines to print.</summary>
    public async Task<IReadOnlyList<string>> PrepareAsync(string store, CancellationToken cancellationToken)
    {
        var file = Path.Combine(store, "people.yaml");
        if (!File.Exists(file))
            return [];
        var people = StoreReader.ReadPeople(await File.ReadAllTextAsync(file, cancellationToken)).Require();
        var before = DemoSecrets.Read(options.DataFolder);
        var secrets = DemoSecrets.Choose(options, before);
        secrets.Write(options.DataFolder);
        var made = (await prepare.RunAsync(people, secrets.Password, secrets.Passphrase, cancellationToken)).Select(a => a.Name).ToHashSet();
        var known = (await accounts.ListAsync(Caller.System, cancellationToken)).Value ?? [];
        // A real account that happens to have such a name is nobody of the demonstration: it keeps its password and its key.
        var demo = known.Where(account => account.Demo).Select(account => account.Name).ToHashSet();
        people = [.. people.Where(person => demo.Contains(person.Name))];
        if (people.Count == 0)
            return [];
        foreach (var person in people.Where(p => !made.Contains(p.Name)))
            await RenewAsync(person, secrets, before, cancellationToken);
        var width = people.Max(p => p.Name.Length);
        return
        [
            "demo people (name, role):",
            .. people.Select(p => $"  {p.Name.PadRight(width)}  {p.DisplayName}, {p.Role}"),
            $"password of each: {secrets.Password}",
            $"signing passphrase of each signer: {secrets.Passphrase}",
        ];
    }

    private async Task RenewAsync(StorePerson person, DemoSecrets secrets, DemoSecrets? before, CancellationToken cancellationToken)
    {
        if (before?.Password != secrets.Password)
            Demand(await accounts.ChangeAsync(Caller.System, new AccountChange(person.Name, null, null, secrets.Password), cancellationToken));
        if (before?.Passphrase != secrets.Passphrase && PrepareDemo.Signs(person.Role))
            Demand(await enrolment.RunAsync(Caller.System, new Enrolment(person.Name, secrets.Passphrase), cancellationToken));
    }

    private static void Demand<T>(Outcome<T> outcome)
    {
        if (!outcome.Succeeded)
            throw new StartupException(outcome.Refusal.Detail);
    }
}
