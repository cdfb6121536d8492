using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Accounts;

internal sealed class AccountListModel(KeepAccounts useCase, EnrolSigner enrol) : LedgerPage
{
    public static RoleRule Rule => KeepAccounts.Rule;

    public IReadOnlyList<AccountView> Accounts { get; private set; } = [];

    public Task<IActionResult> OnGetAsync() => ShowAsync(null);

    public Task<IActionResult> OnPostCreateAsync(string? formKey, string? name, string? displayName, string? password, string[] roles) =>
        StepAsync(useCase.CreateAsync(Sender(formKey), new NewAccount(name?.Trim() ?? "", displayName ?? "", roles, password), Cancellation));

    public Task<IActionResult> OnPostChangeAsync(string? formKey, string? name, bool? disabled) =>
        StepAsync(useCase.ChangeAsync(Sender(formKey), new AccountChange(name ?? "", null, disabled, null), Cancellation));

    public Task<IActionResult> OnPostEnrolAsync(string? formKey, string? name, string? passphrase) =>
        StepAsync(enrol.RunAsync(Sender(formKey), new Enrolment(name ?? "", passphrase ?? ""), Cancellation));

    private async Task<IActionResult> StepAsync<T>(Task<Outcome<T>> step)
    {
        var outcome = await step;
        return outcome.Succeeded ? LocalRedirect("/accounts") : await ShowAsync(outcome.Refusal);
    }

    private async Task<IActionResult> ShowAsync(Refusal? refusal)
    {
        var found = await useCase.ListAsync(Caller, Cancellation);
        Accounts = found.Value ?? [];
        return (refusal ?? found.Refusal) is { } refused ? Refuse(refused) : Page();
    }
}
