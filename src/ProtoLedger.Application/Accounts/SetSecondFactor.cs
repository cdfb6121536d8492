using System.Security.Cryptography;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Application.Accounts;

/// <summary>A secret for an authenticator program, not yet in force.</summary>
/// <param name="Secret">Base32.</param>
/// <param name="Address">The same as an otpauth address, for a picture code.</param>
public sealed record SecondFactorOffer(string Secret, string Address);

/// <summary>Sets up the second factor of one's own account: it is in force once a code shows that the program has the secret.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="secondFactor">Codes.</param>
public sealed class SetSecondFactor(Commands commands, SecondFactor secondFactor)
{
    private const int SecretLength = 20;
    private static readonly CommandKind Kind = new("set-second-factor", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Own;

    /// <summary>Offers a new secret; nothing is kept yet.</summary>
    /// <param name="caller">Whose account.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<SecondFactorOffer>> StartAsync(Caller caller, CancellationToken cancellationToken) =>
        commands.ReadAsync<SecondFactorOffer>(
            caller,
            Kind,
            caller.Actor.Name,
            _ =>
            {
                var secret = Base32.Encode(RandomNumberGenerator.GetBytes(SecretLength));
                return Task.FromResult<Outcome<SecondFactorOffer>>(
                    new SecondFactorOffer(secret, $"otpauth://totp/ProtoLedger:{caller.Actor.Name}?secret={secret}&issuer=ProtoLedger"));
            },
            cancellationToken);

    /// <summary>Puts a secret in force.</summary>
    /// <param name="caller">Whose account.</param>
    /// <param name="secret">As offered.</param>
    /// <param name="code">Code that the program shows now.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<bool>> ConfirmAsync(Caller caller, string secret, string code, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Kind, caller.Actor.Name, new { }, command => ConfirmAsync(command, secret, code), cancellationToken);

    private async Task<Outcome<bool>> ConfirmAsync(Command command, string secret, string code)
    {
        var bytes = Base32.Decode(secret);
        if (bytes.Length != SecretLength)
            return Invalid.Field("/secret", null, "the secret as offered", "The secret is not the one that was offered.");
        if (!SecondFactor.Matches(bytes, code, command.Now, used: 0, out var step))
            return Invalid.Field("/code", null, "six digits", "The code does not fit the secret; check the clock of the device.");
        if (await command.Stores.Accounts.FindAsync(command.Actor.Name, forUpdate: true, command.Cancellation) is not { } account)
            return new NotFound($"There is no account {command.Actor.Name}.");
        await command.Stores.Accounts.UpdateAsync(
            account with { TotpSecret = secondFactor.Seal(account.Name, bytes), TotpStep = step }, command.Cancellation);
        return true;
    }
}
