using System.Net.Http.Headers;
using System.Runtime.CompilerServices;
using System.Text.Json;
using System.Text.RegularExpressions;
using Hl7.Fhir.Model;
using RespDerive.Fhir.Writing;

namespace RespDerive.Fhir.Server;

/// <summary>
/// One FHIR R4 server over HTTP. Stateless and safe for parallel use; resilience and credentials are handlers of the client passed in.
/// </summary>
/// <remarks>
/// Asks only below its base: references and page links to other hosts are refused, so credentials never leave.
/// Logs nothing. Use <see cref="Handler"/> as the innermost handler, since a redirect would be followed below our sight.
/// </remarks>
public sealed partial class FhirServer
{
    private const string Json = "application/fhir+json";
    private readonly HttpClient _http;
    private readonly ServerBase _base;
    private readonly TimeProvider _time;

    /// <summary>A server.</summary>
    /// <param name="http">The client; its base address is not used.</param>
    /// <param name="address">Service base.</param>
    /// <param name="time">Clock, for Retry-After given as a date.</param>
    /// <exception cref="ArgumentException">The address is not an absolute http or https base.</exception>
    public FhirServer(HttpClient http, Uri address, TimeProvider time) => (_http, _base, _time) = (http, new ServerBase(address), time);

    /// <summary>The innermost handler to use: no redirects, no cookies.</summary>
    public static SocketsHttpHandler Handler() => new() { AllowAutoRedirect = false, UseCookies = false };

    /// <summary>Reads a resource, or one version of it, past caches.</summary>
    /// <param name="reference"><c>Type/id</c>, with or without version, or an absolute reference of this server; <c>#part</c> is ignored.</param>
    /// <param name="cancel">Cancels.</param>
    public async Task<ReadAnswer> ReadAsync(string reference, CancellationToken cancel = default)
    {
        if (_base.OfReference(reference) is not { } address)
        {
            return new ReadAnswer(0, [], null, "foreign-reference");
        }

        var reply = await SendAsync(Get(address), cancel);
        return reply.Status == 0
            ? new ReadAnswer(0, [], null, reply.Foreign ? "foreign-reference" : "network")
            : new ReadAnswer(reply.Status, reply.Body, Landing.Version(reply.ETag), null, DeliveryVerdict.Wait(reply.RetryAfter, reply.RateLimit, _time.GetUtcNow()));
    }

    /// <summary>Searches, page by page, as the server's own next links lead.</summary>
    /// <param name="query"><c>Type?name=value…</c>, already encoded.</param>
    /// <param name="cancel">Cancels.</param>
    /// <exception cref="SearchFailedException">A page could not be had, or a next link leads to another host or in a circle.</exception>
    public async IAsyncEnumerable<SearchPage> SearchAsync(string query, [EnumeratorCancellation] CancellationToken cancel = default)
    {
        if (!Query().IsMatch(query))
        {
            throw new ArgumentException("A query starts with a resource type and a question mark.", nameof(query));
        }

        var visited = new HashSet<Uri>();
        for (var next = _base.At(query); next is not null;)
        {
            if (!visited.Add(next))
            {
                throw new SearchFailedException(new ServerAnswer.Parked("paging-loop", "A next link leads back to a page already read."));
            }

            var reply = await SendAsync(Get(next), cancel);
            if (reply.Status != 200)
            {
                // A page that is no longer there means an expired search, which can be done again.
                throw new SearchFailedException(visited.Count > 1 && reply.Status is 404 or 410 ? new ServerAnswer.Retry(null, false) : Verdict(reply));
            }

            (var page, next) = PageReading.Of(reply.Body, _base);
            yield return page;
        }
    }

    /// <summary>Every resource with an identifier; more than one means duplicates to retire.</summary>
    /// <exception cref="SearchFailedException">The search failed.</exception>
    public async Task<IReadOnlyList<ServerAnswer.Delivered>> FindAsync(string type, string system, string value, CancellationToken cancel = default)
    {
        var found = new List<ServerAnswer.Delivered>();
        await foreach (var page in SearchAsync($"{type}?{TransactionForm.Query(system, value)}", cancel))
        {
            foreach (var entry in page.Entries)
            {
                using var json = JsonDocument.Parse(entry.Resource);
                if (Landing.Of(json.RootElement, type, null, null) is { } resource)
                {
                    found.Add(resource);
                }
            }
        }

        return found;
    }

    /// <summary>What we have testified about a target; Provenances of others are left out.</summary>
    /// <param name="target"><c>Observation/id</c>.</param>
    /// <param name="words">Names of our extensions.</param>
    /// <param name="cancel">Cancels.</param>
    /// <exception cref="SearchFailedException">The search failed.</exception>
    public async Task<IReadOnlyList<OwnProvenance>> OwnProvenancesAsync(string target, Vocabulary words, CancellationToken cancel = default)
    {
        var found = new List<OwnProvenance>();
        await foreach (var page in SearchAsync($"Provenance?target={Uri.EscapeDataString(target)}", cancel))
        {
            foreach (var entry in page.Entries)
            {
                using var json = JsonDocument.Parse(entry.Resource);
                if (OwnProvenance.Of(json.RootElement, words) is { } ours)
                {
                    found.Add(ours);
                }
            }
        }

        return found;
    }

    /// <summary>Creates a resource; with <paramref name="ifNoneExist"/> (query part only) unless one matches.</summary>
    public async Task<ServerAnswer> CreateAsync(Resource resource, string? ifNoneExist = null, CancellationToken cancel = default)
    {
        var request = Send(HttpMethod.Post, _base.At(resource.TypeName), resource);
        if (ifNoneExist is not null)
        {
            request.Headers.TryAddWithoutValidation("If-None-Exist", ifNoneExist);
        }

        return await WriteAsync(request, resource, ifNoneExist is not null, cancel);
    }

    /// <summary>Updates a resource by its id; with <paramref name="version"/> only if the server still holds that one.</summary>
    /// <exception cref="ArgumentException">The resource has no id.</exception>
    public async Task<ServerAnswer> UpdateAsync(Resource resource, string? version, CancellationToken cancel = default)
    {
        var request = Send(HttpMethod.Put, _base.At($"{resource.TypeName}/{resource.Id ?? throw new ArgumentException("No id.", nameof(resource))}"), resource);
        if (version is not null)
        {
            request.Headers.IfMatch.Add(new EntityTagHeaderValue($"\"{version}\"", isWeak: true));
        }

        return await WriteAsync(request, resource, false, cancel);
    }

    /// <summary>Deletes a resource that should not have been written. False when the server did not do it.</summary>
    public async Task<bool> DeleteAsync(string type, string id, CancellationToken cancel = default)
    {
        var reply = await SendAsync(new HttpRequestMessage(HttpMethod.Delete, _base.At($"{type}/{id}")), cancel);
        return reply.Status is (>= 200 and <= 299) or 404 or 410;
    }

    /// <summary>Posts a transaction and looks at every entry of the answer.</summary>
    public async Task<TransactionAnswer> TransactAsync(Bundle transaction, CancellationToken cancel = default)
    {
        var reply = await SendAsync(Send(HttpMethod.Post, _base.Whole, transaction), cancel);
        if (reply.Status is < 200 or > 299)
        {
            return new TransactionAnswer(Verdict(reply), []);
        }

        var entries = TransactionReading.Of(reply.Body, transaction, _time.GetUtcNow());
        if (entries is null)
        {
            return new TransactionAnswer(new ServerAnswer.Unknown("The answer is no transaction-response with one entry for each sent."), []);
        }

        for (var i = 0; i < entries.Length; i++)
        {
            if (entries[i] is ServerAnswer.Unknown)
            {
                entries[i] = await LookUpAsync(transaction.Entry[i].Resource!, cancel);
            }
        }

        return new TransactionAnswer(entries.FirstOrDefault(entry => entry is not ServerAnswer.Delivered) ?? entries[0], entries);
    }

    /// <summary>What the server says it can do; null when it does not answer with a CapabilityStatement.</summary>
    public async Task<Capability?> ProbeAsync(CancellationToken cancel = default)
    {
        var reply = await SendAsync(Get(_base.At("metadata")), cancel);
        using var json = reply.Parsed();
        return reply.Status == 200 && json?.RootElement.Text("resourceType") == "CapabilityStatement" ? CapabilityReading.Of(json.RootElement) : null;
    }

    private async Task<ServerAnswer> WriteAsync(HttpRequestMessage request, Resource resource, bool conditional, CancellationToken cancel)
    {
        var update = request.Method == HttpMethod.Put;
        var reply = await SendAsync(request, cancel);
        if (reply.Status is < 200 or > 299)
        {
            return update && reply.Status == 404 ? new ServerAnswer.Gone() : Verdict(reply);
        }

        using var json = reply.Parsed();
        var landed = Landing.Of(json?.RootElement ?? default, resource.TypeName, reply.Location, reply.ETag)
            ?? (update ? new ServerAnswer.Delivered(resource.Id!, Landing.Version(reply.ETag)) : null);
        return landed is null ? await LookUpAsync(resource, cancel) : landed with { Existed = conditional && reply.Status == 200 };
    }

    /// <summary>The server said yes without an id: find by identifier what it holds.</summary>
    private async Task<ServerAnswer> LookUpAsync(Resource resource, CancellationToken cancel)
    {
        if (resource is not IIdentifiable<List<Identifier>> { Identifier: [{ System: { } system, Value: { } value }, ..] })
        {
            return new ServerAnswer.Unknown("The server told no id, and the resource has no identifier to look it up by.");
        }

        try
        {
            return await FindAsync(resource.TypeName, system, value, cancel) switch
            {
                [var one] => one,
                [] => new ServerAnswer.Unknown("The server told no id and does not find the identifier."),
                _ => new ServerAnswer.Conflict(),
            };
        }
        catch (SearchFailedException)
        {
            return new ServerAnswer.Unknown("The server told no id, and looking it up failed.");
        }
    }

    private ServerAnswer Verdict(HttpReply reply) => reply switch
    {
        { Foreign: true } => new ServerAnswer.Parked("redirect", "The answer came from another host."),
        { Status: 0 } => new ServerAnswer.Retry(null, reply.MayBeWritten),
        _ => DeliveryVerdict.Of(reply.Status, reply.Body, reply.RetryAfter, reply.RateLimit, _time.GetUtcNow()),
    };

    private static HttpRequestMessage Get(Uri address)
    {
        var request = new HttpRequestMessage(HttpMethod.Get, address);
        request.Headers.CacheControl = new CacheControlHeaderValue { NoCache = true };
        return request;
    }

    private static HttpRequestMessage Send(HttpMethod method, Uri address, Resource resource)
    {
        var request = new HttpRequestMessage(method, address) { Content = new ByteArrayContent(FhirJson.Bytes(resource)) };
        request.Content.Headers.ContentType = new MediaTypeHeaderValue(Json, "utf-8");
        request.Headers.TryAddWithoutValidation("Prefer", "return=representation");
        return request;
    }

    private async Task<HttpReply> SendAsync(HttpRequestMessage request, CancellationToken cancel)
    {
        request.Headers.Accept.Add(new MediaTypeWithQualityHeaderValue(Json));
        try
        {
            using (request)
            using (var response = await _http.SendAsync(request, cancel))
            {
                return response.RequestMessage?.RequestUri is { } came && !_base.Holds(came)
                    ? new HttpReply(0, []) { Foreign = true }
                    : await HttpReply.Of(response, cancel);
            }
        }
        catch (Exception exception) when (!cancel.IsCancellationRequested)
        {
            // Whatever the client's handlers throw (timeout, broken circuit, lost connection): nothing came back.
            return new HttpReply(0, []) { MayBeWritten = !HttpReply.NeverLeft(exception) };
        }
    }

    [GeneratedRegex(@"^[A-Z][A-Za-z]{1,40}\?")]
    private static partial Regex Query();
}
