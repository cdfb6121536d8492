using Microsoft.AspNetCore.Mvc;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Sessions;

internal sealed class SignInModel(SignIn useCase) : LedgerPage
{
    public static RoleRule Rule => Application.Accounts.SignIn.Rule;

    public string? Name { get; private set; }

    public string? Next { get; private set; }

    public void OnGet(string? next) => Next = next;

    public async Task<IActionResult> OnPostAsync(string? name, string? password, string? code, string? next)
    {
        (Name, Next) = (name, next);
        var opened = await useCase.RunAsync(Caller, new Credentials(name ?? "", password ?? "", string.IsNullOrWhiteSpace(code) ? null : code.Trim()), Cancellation);
        if (!opened.Succeeded)
            return Refuse(opened.Refusal);
        SessionCookie.Write(Response, opened.Value.Token);
        return LocalRedirect(Url.IsLocalUrl(next) ? next : "/");
    }
}
