using Microsoft.Extensions.DependencyInjection;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Bundles;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Importing;
using ProtoLedger.Application.Predictions;
using ProtoLedger.Application.Repairs;
using ProtoLedger.Application.Reporting;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Site;

namespace ProtoLedger.Application;

/// <summary>Wires the use cases.</summary>
public static class ApplicationServices
{
    /// <summary>Adds every use case; stores and a <see cref="TimeProvider"/> are added elsewhere.</summary>
    /// <param name="services">Services.</param>
    /// <param name="site">The installation.</param>
    /// <param name="accounts">Limits of sessions; null for the usual ones.</param>
    public static IServiceCollection AddProtoLedgerApplication(this IServiceCollection services, SiteOptions site, AccountOptions? accounts = null)
    {
        ArgumentNullException.ThrowIfNull(services);
        services.AddSingleton(site).AddSingleton(accounts ?? AccountOptions.Default);
        foreach (var service in Services)
            services.AddSingleton(service);
        return services;
    }

    private static readonly Type[] Services =
    [
        typeof(Commands), typeof(SiteKeys), typeof(LedgerWriter), typeof(DocumentShelf), typeof(Passwords), typeof(SecondFactor), typeof(SigningKeys),
        typeof(CreateChangeRequest), typeof(EditChangeRequest), typeof(SubmitChangeRequest), typeof(WithdrawChangeRequest),
        typeof(DeclineChangeRequest), typeof(ApproveChangeRequest), typeof(RebaseChangeRequest), typeof(MakeEffective),
        typeof(ReadChangeRequests), typeof(AddComment), typeof(ReadDocuments), typeof(ReadRuns), typeof(EnqueueRun), typeof(ReadLedger), typeof(ReadAudit), typeof(AuditLedger), typeof(RecordLoading), typeof(ExportBundle), typeof(PrepareSite),
        typeof(PredictSeries), typeof(OfferRepairs), typeof(CarryProtocolOver), typeof(RecordDenial), typeof(SignIn), typeof(Authenticate), typeof(SignOut), typeof(SetSecondFactor), typeof(KeepTokens), typeof(KeepAccounts), typeof(EnrolSigner), typeof(RevokeCertificate),
        typeof(ImportStore), typeof(PrepareDemo), typeof(RunWorker), typeof(NightlySweep), typeof(ChangeReports), typeof(CompareRuns),
    ];
}
