using Microsoft.AspNetCore.Mvc;
using Microsoft.AspNetCore.Mvc.RazorPages;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Server.Http;

/// <summary>What every page shares: who looks at it, and what was refused.</summary>
internal abstract class LedgerPage : PageModel
{
    /// <summary>Why the last step was refused, or null.</summary>
    public Refusal? Refused { get; private set; }

    /// <summary>Names the form that is shown, so that sending it twice has one effect.</summary>
    public string FormKey { get; } = Guid.NewGuid().ToString("N");

    /// <summary>Who looks at the page.</summary>
    public Actor Actor => HttpContext.RequestServices.GetRequiredService<CurrentCaller>().Caller.Actor;

    protected Caller Caller => HttpContext.RequestServices.GetRequiredService<CurrentCaller>().Caller;

    protected CancellationToken Cancellation => HttpContext.RequestAborted;

    /// <summary>The caller with the key of the form that was sent.</summary>
    protected Caller Sender(string? formKey) => Caller with { IdempotencyKey = string.IsNullOrEmpty(formKey) ? FormKey : formKey };

    /// <summary>Shows the page with the refusal on top, under the status that the API would give.</summary>
    protected PageResult Refuse(Refusal refusal)
    {
        Refused = refusal;
        Response.StatusCode = Problems.From(refusal).Type.Status;
        return Page();
    }

    /// <summary>A page that says that there is nothing of that name.</summary>
    protected IActionResult Absent(Refusal refusal)
    {
        HttpContext.Features.Set(new RefusalShown(refusal));
        return StatusCode(Problems.From(refusal).Type.Status);
    }
}

/// <summary>A refusal for the page of errors.</summary>
internal sealed record RefusalShown(Refusal Refusal);
