using System.Threading.Channels;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Hosting;
using Microsoft.AspNetCore.Http;
using Microsoft.Extensions.Logging;

namespace RespDerive.Sandbox.Tests.Endpoint;

/// <summary>The other end of a rest-hook.</summary>
internal sealed class Receiver : IAsyncDisposable
{
    private readonly WebApplication _app;
    private readonly Channel<Notice> _notices = Channel.CreateUnbounded<Notice>();
    private int _refuse;

    private Receiver(WebApplication app) => _app = app;

    public string Url => _app.Urls.First() + "/hook";

    /// <summary>How many of the next notifications are answered 503.</summary>
    public void RefuseNext(int count) => Interlocked.Exchange(ref _refuse, count);

    public ValueTask<Notice> Next() => _notices.Reader.ReadAsync(Client.Cancel);

    public int Waiting => _notices.Reader.Count;

    public static async Task<Receiver> Start()
    {
        var builder = WebApplication.CreateSlimBuilder();
        builder.Logging.ClearProviders();
        builder.WebHost.UseUrls("http://127.0.0.1:0");
        var app = builder.Build();
        var receiver = new Receiver(app);
        app.Run(receiver.Receive);
        await app.StartAsync(Client.Cancel);
        return receiver;
    }

    private async Task Receive(HttpContext http)
    {
        using var reader = new StreamReader(http.Request.Body);
        var notice = new Notice(http.Request.Method, http.Request.Path, await reader.ReadToEndAsync(http.RequestAborted), http.Request.Headers.Authorization.ToString());
        var refused = Interlocked.Decrement(ref _refuse) >= 0;
        http.Response.StatusCode = refused ? 503 : 200;
        if (!refused)
        {
            await _notices.Writer.WriteAsync(notice);
        }
    }

    public async ValueTask DisposeAsync() => await _app.DisposeAsync();
}

internal sealed record Notice(string Method, string Path, string Body, string Authorization);
