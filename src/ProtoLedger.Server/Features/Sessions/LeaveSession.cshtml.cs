using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Sessions;

internal sealed class LeaveSessionModel(SignOut useCase) : LedgerPage
{
    public static RoleRule Rule => Application.Accounts.SignOut.Rule;

    public async Task<IActionResult> OnPostAsync()
    {
        if (SessionCookie.Read(Request) is { } secret)
            await useCase.RunAsync(Caller, secret, Cancellation);
        SessionCookie.Clear(Response);
        return LocalRedirect("/sign-in");
    }
}
