using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;
using Microsoft.AspNetCore.Routing;
using RespDerive.Service.Intake;
using RespDerive.Storage;

namespace RespDerive.Service.Operations;

/// <summary>
/// Health for an orchestrator. Live: the process answers. Startup and ready: the store works; whether the criteria were read once is told beside.
/// A FHIR server that is down leaves the service ready: what comes in is kept, what goes out waits.
/// </summary>
internal static class Health
{
    public static void Map(IEndpointRouteBuilder routes)
    {
        routes.MapGet("/health/live", () => Results.Ok(new { status = "live" }));
        routes.MapGet("/health/startup", Ready);
        routes.MapGet("/health/ready", Ready);
    }

    private static IResult Ready(Store store, Poller poller, TimeProvider time)
    {
        var now = time.GetUtcNow();
        var report = new
        {
            status = store.Failure is { } failure ? failure.Code : "ready",
            read = poller.HasPolled,
            oldestUnreadSeconds = Age(store.OldestOpen()),
            oldestUndeliveredSeconds = Age(store.OldestPending()),
        };
        return store.Failure is null ? Results.Ok(report) : Results.Json(report, statusCode: 503);

        double? Age(DateTimeOffset? since) => since is { } time ? Math.Round((now - time).TotalSeconds, 1) : null;
    }
}
