using System.CommandLine;
using System.Text;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Cli;

/// <summary><c>add-administrator NAME</c>: makes the first account of a site; everybody else is made by an administrator.</summary>
internal static class AddAdministratorCommand
{
    public static Command Create()
    {
        var name = new Argument<string>("NAME") { Description = "Account name, lower case." };
        var displayName = new Option<string?>("--display-name") { Description = "Name as people say it." };
        var command = new Command("add-administrator", "Make an administrator's account. The password is read from the terminal or from standard input.") { name, displayName };
        command.SetAction((result, cancellationToken) => Installation.RunAsync(
            installation => RunAsync(
                installation, result.GetRequiredValue(name), result.GetValue(displayName), result.InvocationConfiguration.Output, result.InvocationConfiguration.Error, cancellationToken),
            result.InvocationConfiguration.Error,
            cancellationToken));
        return command;
    }

    private static async Task<int> RunAsync(
        Installation installation, string name, string? displayName, TextWriter output, TextWriter error, CancellationToken cancellationToken)
    {
        await output.WriteAsync("Password (15 characters at least): ");
        var password = Console.IsInputRedirected ? await Console.In.ReadLineAsync(cancellationToken) ?? "" : ReadHidden();
        await output.WriteLineAsync();
        var made = await installation.Get<KeepAccounts>().CreateAsync(
            Caller.System, new NewAccount(name, displayName ?? name, [Roles.Administrator], password), cancellationToken);
        if (made.Succeeded)
        {
            await output.WriteLineAsync($"{made.Value.Name} can sign in.");
            return ExitCodes.Good;
        }

        await error.WriteLineAsync(made.Refusal is Invalid invalid ? string.Join(' ', invalid.Errors.Select(e => e.Detail)) : made.Refusal.Detail);
        return ExitCodes.Bad;
    }

    private static string ReadHidden()
    {
        var typed = new StringBuilder();
        while (Console.ReadKey(intercept: true) is { Key: not ConsoleKey.Enter } key)
        {
            if (key.Key == ConsoleKey.Backspace)
                typed.Length = Math.Max(0, typed.Length - 1);
            else
                typed.Append(key.KeyChar);
        }

        return typed.ToString();
    }
}
