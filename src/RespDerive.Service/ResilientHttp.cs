using System.Net;
using Polly;
using Polly.CircuitBreaker;
using Polly.Retry;
using RespDerive.Fhir.Server;

namespace RespDerive.Service;

/// <summary>
/// HTTP with resilience: reads are retried, and a server that keeps failing is left alone for a while.
/// Writes are never retried here, since their outcome may be unknown; delivery looks first what the server holds.
/// </summary>
internal sealed class ResilientHttp : DelegatingHandler
{
    private static readonly TimeSpan Timeout = TimeSpan.FromSeconds(30);
    private readonly ResiliencePipeline<HttpResponseMessage> _reads;
    private readonly ResiliencePipeline<HttpResponseMessage> _writes;

    private ResilientHttp()
    {
        var breaker = new CircuitBreakerStrategyOptions<HttpResponseMessage>
        {
            FailureRatio = 0.9,
            MinimumThroughput = 10,
            SamplingDuration = TimeSpan.FromSeconds(10),
            BreakDuration = TimeSpan.FromSeconds(5),
            ShouldHandle = Failed,
        };
        _writes = new ResiliencePipelineBuilder<HttpResponseMessage>().AddCircuitBreaker(breaker).Build();
        _reads = new ResiliencePipelineBuilder<HttpResponseMessage>()
            .AddRetry(new RetryStrategyOptions<HttpResponseMessage>
            {
                MaxRetryAttempts = 2,
                Delay = TimeSpan.FromMilliseconds(200),
                BackoffType = DelayBackoffType.Exponential,
                UseJitter = true,
                ShouldHandle = Failed,
            })
            .AddPipeline(_writes)
            .Build();
    }

    /// <summary>A client with these rules and, when given, an Authorization header.</summary>
    public static HttpClient Client(string? authorization)
    {
        var client = new HttpClient(new ResilientHttp { InnerHandler = FhirServer.Handler() }) { Timeout = Timeout };
        if (authorization is not null)
        {
            client.DefaultRequestHeaders.TryAddWithoutValidation("Authorization", authorization);
        }

        return client;
    }

    protected override async Task<HttpResponseMessage> SendAsync(HttpRequestMessage request, CancellationToken cancellationToken)
    {
        var pipeline = request.Method == HttpMethod.Get ? _reads : _writes;
        return await pipeline.ExecuteAsync(async token => await base.SendAsync(request, token), cancellationToken);
    }

    private static ValueTask<bool> Failed(RetryPredicateArguments<HttpResponseMessage> attempt) => ValueTask.FromResult(Failed(attempt.Outcome));

    private static ValueTask<bool> Failed(CircuitBreakerPredicateArguments<HttpResponseMessage> attempt) => ValueTask.FromResult(Failed(attempt.Outcome));

    private static bool Failed(Outcome<HttpResponseMessage> outcome) =>
        outcome.Exception is HttpRequestException
        || outcome.Result?.StatusCode is HttpStatusCode.BadGateway or HttpStatusCode.ServiceUnavailable or HttpStatusCode.GatewayTimeout;
}
