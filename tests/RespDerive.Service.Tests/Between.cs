using System.Collections.Concurrent;
using System.Text.Json.Nodes;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;
using Microsoft.Extensions.Logging;

namespace RespDerive.Service.Tests;

/// <summary>What stands between the service and the server written to: it passes everything on, unless a test has plans for a write.</summary>
internal sealed class Between : IAsyncDisposable
{
    private static readonly string[] Passed = ["If-None-Exist", "If-Match", "Prefer"];
    private readonly ConcurrentQueue<Plan> _transactions = new();
    private readonly ConcurrentQueue<Plan> _devices = new();
    private readonly HttpClient _http = new();
    private readonly WebApplication _app;

    private Between(WebApplication app) => _app = app;

    /// <summary>How one write is carried out. Null cuts the connection.</summary>
    /// <param name="sent">What the service sent.</param>
    /// <param name="pass">Passes something on to the server.</param>
    /// <param name="left">Ends when the service no longer waits for the answer.</param>
    public delegate Task<Reply?> Plan(JsonObject sent, Func<JsonObject, Task<Reply>> pass, CancellationToken left);

    public string BaseUrl => _app.Urls.First();

    /// <summary>The service and the server.</summary>
    public Bench Bench { get; private set; } = null!;

    /// <summary>A service that writes through this to the sandbox, and reads what it is told by hand.</summary>
    public static async Task<Between> StartAsync(params (string Key, string? Value)[] settings)
    {
        var builder = WebApplication.CreateSlimBuilder();
        builder.Logging.ClearProviders();
        var app = builder.Build();
        app.Urls.Add("http://127.0.0.1:0");
        var between = new Between(app);
        app.Run(between.ServeAsync);
        await app.StartAsync(TestContext.Current.CancellationToken);
        between.Bench = await Bench.StartAsync([.. Bench.Silent, ("Delivery:Address", between.BaseUrl), .. settings]);
        return between;
    }

    /// <summary>Plans the next transaction.</summary>
    public void Next(Plan plan) => _transactions.Enqueue(plan);

    /// <summary>Plans the next write of our Device.</summary>
    public void NextDevice(Plan plan) => _devices.Enqueue(plan);

    /// <summary>The next transaction is carried out, and its answer kept back until the service leaves or a test lets it be lost.</summary>
    /// <returns>Carried out; and what lets it be lost.</returns>
    public (Task Done, TaskCompletionSource Lose) KeepNextAnswer()
    {
        var (done, lose) = (new TaskCompletionSource(TaskCreationOptions.RunContinuationsAsynchronously), new TaskCompletionSource(TaskCreationOptions.RunContinuationsAsynchronously));
        Next(async (sent, pass, left) =>
        {
            await pass(sent);
            done.SetResult();
            await using var leaving = left.Register(() => lose.TrySetResult());
            await lose.Task;
            return null;
        });
        return (done.Task.WaitAsync(TimeSpan.FromSeconds(20), TestContext.Current.CancellationToken), lose);
    }

    public static Reply Failed(int status, string code = "transient") => new(status, new JsonObject
    {
        ["resourceType"] = "OperationOutcome",
        ["issue"] = new JsonArray(new JsonObject { ["severity"] = "error", ["code"] = code }),
    });

    /// <summary>A transaction of some of the entries.</summary>
    public static JsonObject Only(JsonObject transaction, Func<JsonNode, bool> some) => new()
    {
        ["resourceType"] = "Bundle",
        ["type"] = "transaction",
        ["entry"] = new JsonArray([.. transaction["entry"]!.AsArray().Where(entry => some(entry!)).Select(entry => entry!.DeepClone())]),
    };

    public async ValueTask DisposeAsync()
    {
        await Bench.DisposeAsync();
        await _app.StopAsync(new CancellationToken(true));
        await _app.DisposeAsync();
        _http.Dispose();
    }

    private async Task ServeAsync(HttpContext context)
    {
        using var body = new MemoryStream();
        await context.Request.Body.CopyToAsync(body);
        var plans = context.Request.Method != "POST" ? null : context.Request.Path.Value switch
        {
            "/" => _transactions,
            "/Device" => _devices,
            _ => null,
        };
        var reply = plans is not null && plans.TryDequeue(out var plan)
            ? await plan(JsonNode.Parse(body.ToArray())!.AsObject(), sent => PassAsync(context.Request, FhirClient.Content(sent)), context.RequestAborted)
            : await PassAsync(context.Request, body.Length == 0 ? null : FhirClient.Content(JsonNode.Parse(body.ToArray())!));
        if (reply is null)
        {
            context.Abort();
            return;
        }

        context.Response.StatusCode = reply.Status;
        if (reply.ETag is { } tag)
        {
            context.Response.Headers.ETag = tag;
        }

        if (reply.Body is { } answer)
        {
            context.Response.ContentType = "application/fhir+json";
            await context.Response.WriteAsync(answer.ToJsonString());
        }
    }

    private async Task<Reply> PassAsync(HttpRequest request, HttpContent? content)
    {
        using var onward = new HttpRequestMessage(new HttpMethod(request.Method), Bench.Sandbox.BaseUrl + request.Path.Value!.TrimEnd('/') + request.QueryString) { Content = content };
        foreach (var header in Passed.Where(request.Headers.ContainsKey))
        {
            onward.Headers.TryAddWithoutValidation(header, request.Headers[header].ToString());
        }

        // Not ended with the service: what has reached a server is carried out.
        using var response = await _http.SendAsync(onward);
        var text = await response.Content.ReadAsStringAsync();
        return new Reply((int)response.StatusCode, text.Length == 0 ? null : JsonNode.Parse(text)!.AsObject()) { ETag = response.Headers.ETag?.ToString() };
    }
}

/// <summary>An HTTP answer.</summary>
internal sealed record Reply(int Status, JsonObject? Body)
{
    public string? ETag { get; init; }
}
