using System.Globalization;
using Microsoft.Net.Http.Headers;

namespace ProtoLedger.Server.Http;

/// <summary>Strong entity tags: the row version between quotes (RFC 9110, section 8.8.3).</summary>
internal static class EntityTags
{
    public static string Of(long version) => string.Create(CultureInfo.InvariantCulture, $"\"{version}\"");

    /// <summary>The version that the caller has seen, from the header If-Match.</summary>
    /// <exception cref="ProblemException">The header is missing (428), names any version, or is no tag of this server (412).</exception>
    public static long Expected(HttpRequest request)
    {
        var header = request.Headers.IfMatch.ToString();
        if (header.Length == 0)
            throw new ProblemException(Problems.Of(Problems.PreconditionMissing, "Read the change request and send its ETag in If-Match, so that no unseen change is overwritten."));
        if (header.Trim() == "*")
            throw new ProblemException(Problems.Of(Problems.PreconditionMissing, "If-Match: * would overwrite changes that were not seen; send the ETag that was read."));
        return EntityTagHeaderValue.TryParse(header, out var tag) && !tag.IsWeak
            && long.TryParse(tag.Tag.AsSpan()[1..^1], NumberStyles.None, CultureInfo.InvariantCulture, out var version)
            ? version
            : throw new ProblemException(Problems.Of(Problems.StaleVersion, $"If-Match holds {header}, which is no ETag of this resource."));
    }
}
