using System.Text;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;
using Microsoft.Extensions.Logging;
using RespDerive.Fhir;
using RespDerive.Service;

namespace RespDerive.Benchmarks.EndToEnd;

/// <summary>An endpoint of the same shape that reads the facts, journals them durably and answers, and does nothing else.</summary>
internal sealed class JournalAlone : IAsyncDisposable
{
    private static readonly byte[] Taken = Encoding.UTF8.GetBytes("""{"resourceType":"OperationOutcome","issue":[{"severity":"information","code":"informational","diagnostics":"Taken."}]}""");
    private readonly TemporaryStore _temporary = new();
    private readonly WebApplication _app;

    private JournalAlone()
    {
        var builder = WebApplication.CreateSlimBuilder();
        builder.Logging.ClearProviders();
        _app = builder.Build();
        _app.Map("/notify/{**rest}", TakeAsync);
    }

    public string Address { get; } = $"http://127.0.0.1:{Ports.Free()}";

    public static async Task<JournalAlone> StartAsync()
    {
        var journal = new JournalAlone();
        journal._app.Urls.Add(journal.Address);
        await journal._app.StartAsync();
        return journal;
    }

    public async ValueTask DisposeAsync()
    {
        await _app.StopAsync();
        await _app.DisposeAsync();
        await _temporary.DisposeAsync();
    }

    private async Task TakeAsync(HttpContext context)
    {
        using var buffer = new MemoryStream();
        await context.Request.Body.CopyToAsync(buffer, context.RequestAborted);
        var body = buffer.ToArray();
        var read = FactReader.Read(body, Ward.Source, Ward.Base, null, TimeProvider.System.GetUtcNow());
        await _temporary.Store.AppendAsync([TemporaryStore.ArrivalOf(read.Facts!, body)]);
        context.Response.ContentType = "application/fhir+json; charset=utf-8";
        await context.Response.Body.WriteAsync(Taken, context.RequestAborted);
    }
}
