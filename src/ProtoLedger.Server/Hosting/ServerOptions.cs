using System.ComponentModel.DataAnnotations;
using ProtoLedger.Application.Site;

namespace ProtoLedger.Server.Hosting;

/// <summary>Settings under the section ProtoLedger: environment variables ProtoLedger__Name or the command line.</summary>
internal sealed class ServerOptions
{
    public const string Section = "ProtoLedger";

    /// <summary>Folder of the private cluster and of the sealing key.</summary>
    [Required]
    public string DataFolder { get; set; } = Storage.Clusters.PrivateClusterOptions.DefaultDataFolder();

    /// <summary>web, worker or all.</summary>
    [Required]
    [RegularExpression("web|worker|all")]
    public string Role { get; set; } = "all";

    /// <summary>Folder whose documents are imported into an empty database; null for the one that comes with the program.</summary>
    public string? Store { get; set => field = Filled(value); }

    /// <summary>Whether demo people are made; null means only on the private cluster.</summary>
    public bool? Demo { get; set; }

    /// <summary>Password of every demo person; null means random.</summary>
    [MinLength(1)]
    public string? DemoPassword { get; set => field = Filled(value); }

    /// <summary>Signing passphrase of every demo signer; null means "sign " and the demo password, or random.</summary>
    [MinLength(1)]
    public string? DemoSigningPassphrase { get; set => field = Filled(value); }

    /// <summary>Name of the site, as its certificates show it.</summary>
    [Required]
    [StringLength(60, MinimumLength = 1)]
    public string SiteName { get; set; } = SiteOptions.UsualName;

    /// <summary>Origin line of the checkpoints; no white space, no plus sign.</summary>
    [Required]
    [RegularExpression(@"[^\s+]{1,100}")]
    public string Origin { get; set; } = SiteOptions.UsualOrigin;

    /// <summary>File of the key under which the site's own private keys are sealed; null for sealing.key in the data folder.</summary>
    public string? SealingKeyFile { get; set => field = Filled(value); }

    /// <summary>Workers in this process.</summary>
    [Range(1, 64)]
    public int Workers { get; set; } = Environment.ProcessorCount;

    public bool ServesWeb => Role is "web" or "all";

    public bool Works => Role is "worker" or "all";

    /// <summary>An empty setting, as compose files make them, says nothing.</summary>
    /// <summary>Whether people of the demonstration are there: as set, else on the private cluster only.</summary>
    public bool ShowsDemo(DatabaseAccess database) => Demo ?? database.Cluster is not null;

    private static string? Filled(string? value) => string.IsNullOrEmpty(value) ? null : value;
}
