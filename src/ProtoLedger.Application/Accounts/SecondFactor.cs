using System.Buffers.Binary;
using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using ProtoLedger.Application.Site;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.Accounts;

/// <summary>Time-based one-time codes of RFC 6238: SHA-1, 30 s, six digits, one step of clock difference; a code is taken once.</summary>
public sealed class SecondFactor
{
    private const int StepSeconds = 30;
    private const string Purpose = "second factor of ";
    private readonly SiteOptions site;

    /// <summary>Secrets are sealed under the site's key.</summary>
    /// <param name="site">The site.</param>
    public SecondFactor(SiteOptions site) => this.site = site;

    /// <summary>The code of a secret at a step of 30 s since 1970.</summary>
    internal static string Code(ReadOnlySpan<byte> secret, long step)
    {
        Span<byte> counter = stackalloc byte[8];
        BinaryPrimitives.WriteInt64BigEndian(counter, step);
        Span<byte> mac = stackalloc byte[20];
#pragma warning disable CA5350 // RFC 6238 as authenticator programs implement it: HMAC-SHA-1, whose collisions do not matter here.
        HMACSHA1.HashData(secret, counter, mac);
#pragma warning restore CA5350
        var number = BinaryPrimitives.ReadInt32BigEndian(mac[(mac[^1] & 15)..]) & int.MaxValue;
        return (number % 1_000_000).ToString("D6", CultureInfo.InvariantCulture);
    }

    /// <summary>Step of a time.</summary>
    internal static long Step(DateTime time) => new DateTimeOffset(time).ToUnixTimeSeconds() / StepSeconds;

    /// <summary>A secret, sealed for the account.</summary>
    internal byte[] Seal(string account, byte[] secret) => Sealing.Seal(site.SealingKey, Purpose + account, secret);

    /// <summary>True when the account has no second factor, or the code is right and was not used before.</summary>
    internal bool Accepts(AccountRow account, string? code, DateTime now, out long step)
    {
        step = account.TotpStep;
        return account.TotpSecret is null
            || Matches(Sealing.Open(site.SealingKey, Purpose + account.Name, account.TotpSecret), code, now, account.TotpStep, out step);
    }

    /// <summary>True when the code belongs to a step near now and after <paramref name="used"/>.</summary>
    internal static bool Matches(ReadOnlySpan<byte> secret, string? code, DateTime now, long used, out long step)
    {
        for (step = Step(now) - 1; step <= Step(now) + 1; step++)
        {
            if (step > used && code is { Length: 6 }
                && CryptographicOperations.FixedTimeEquals(Encoding.UTF8.GetBytes(Code(secret, step)), Encoding.UTF8.GetBytes(code)))
                return true;
        }

        step = used;
        return false;
    }
}
