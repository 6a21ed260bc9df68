namespace RespDerive.Sandbox.Endpoint;

/// <summary>
/// A transaction Bundle, all or nothing (R4 "Transaction Processing Rules"): conditions are judged against the
/// store as it was, ids are assigned, links rewritten, then the entries run in the order DELETE, POST, PUT, GET.
/// </summary>
internal sealed class Transaction(Writing writing, ResourceStore store, Func<FhirRequest, FhirAnswer> readOnly)
{
    private readonly Dictionary<string, string> _links = new(StringComparer.Ordinal);
    private readonly Dictionary<int, (string Id, StoredVersion? Existing)> _targets = [];

    public FhirAnswer[] Run(List<BundleEntry> entries) => store.Write(() =>
    {
        foreach (var entry in entries)
        {
            Place(entry);
        }
        RequireDistinct(entries);
        foreach (var entry in entries.Where(e => e.Resource is not null))
        {
            References.Rewrite(entry.Resource, Resolve);
        }
        var answers = new FhirAnswer[entries.Count];
        foreach (var entry in entries.OrderBy(e => e.Turn))
        {
            try
            {
                answers[entry.Position] = Perform(entry);
            }
            catch (Refusal refusal)
            {
                throw new Refusal(refusal.Status, refusal.Issue, $"entry {entry.Position}: {refusal.Message}");
            }
        }
        return answers;
    });

    private void Place(BundleEntry entry)
    {
        if (entry.Method is not ("POST" or "PUT"))
        {
            return;
        }
        if (!ResourceRules.IsType(entry.Type))
        {
            throw Refusal.NotFound(entry.Type);
        }
        ResourceRules.RequireType(entry.Resource!, entry.Type);
        var condition = entry.Method == "POST" ? entry.IfNoneExist : entry.Id is null ? entry.Query : null;
        var matches = condition is null ? [] : entry.Method == "POST" ? writing.Seen(entry.Type, condition) : writing.Matching(entry.Type, condition);
        if (matches.Count > 1)
        {
            throw Refusal.Precondition($"entry {entry.Position}: the condition matches more than one resource");
        }
        var existing = matches.Count == 1 ? matches[0] : null;
        var id = existing?.Id ?? entry.Id ?? (entry.Method == "PUT" ? entry.Resource.Text("id") : null) ?? store.NewId(entry.Type);
        if (entry.Method == "PUT" && entry.Id is not null)
        {
            Writing.RequireId(entry.Resource!, entry.Id);
        }
        _targets.Add(entry.Position, (id, existing));
        if (entry.FullUrl is { } url)
        {
            _links[url] = $"{entry.Type}/{id}";
        }
    }

    private void RequireDistinct(List<BundleEntry> entries)
    {
        var seen = new HashSet<string>(StringComparer.Ordinal);
        foreach (var entry in entries.Where(e => e.Method is "PUT" or "DELETE" || (e.Method == "POST" && _targets[e.Position].Existing is null)))
        {
            var identity = _targets.TryGetValue(entry.Position, out var target) ? $"{entry.Type}/{target.Id}" : entry.Path;
            if (!seen.Add(identity))
            {
                throw Refusal.BadRequest($"{identity} appears more than once");
            }
        }
    }

    private string? Resolve(string text, bool isReference)
    {
        if (_links.TryGetValue(text, out var known))
        {
            return known;
        }
        if (!isReference)
        {
            return null;
        }
        if (text.StartsWith("urn:uuid:", StringComparison.Ordinal) || text.StartsWith("urn:oid:", StringComparison.Ordinal))
        {
            throw Refusal.BadRequest($"{text} is not in the Bundle");
        }
        // A conditional reference is allowed only in a transaction, and must match exactly one resource.
        var mark = text.IndexOf('?', StringComparison.Ordinal);
        return mark > 0 && ResourceRules.IsType(text[..mark])
            ? writing.Matching(text[..mark], text[mark..]) is [var one] ? one.Reference : throw Refusal.Precondition($"{text} does not match exactly one resource")
            : null;
    }

    private FhirAnswer Perform(BundleEntry entry) => entry.Method switch
    {
        "POST" when _targets[entry.Position].Existing is { } existing => FhirAnswer.Of(existing),
        "POST" => writing.Create(entry.Type, entry.Resource!, null, _targets[entry.Position].Id),
        "PUT" => writing.Update(entry.Type, _targets[entry.Position].Id, entry.Resource!, entry.IfMatch),
        "DELETE" when entry.Id is { } id => writing.Delete(entry.Type, id, entry.IfMatch),
        "GET" => readOnly(entry.Request),
        _ => throw Refusal.BadRequest($"{entry.Method} {entry.Path} is not supported in a Bundle"),
    };
}
