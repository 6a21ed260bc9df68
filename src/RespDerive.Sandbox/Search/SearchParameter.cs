namespace RespDerive.Sandbox.Search;

internal enum SearchKind
{
    Token,
    Reference,
    Date,
}

/// <summary>One search parameter of one type: where in the resource it looks.</summary>
/// <param name="Name">Its name in the query.</param>
/// <param name="Kind">How values compare.</param>
/// <param name="Target">Only references to this type count (parameter <c>patient</c>).</param>
/// <param name="Paths">Dotted element paths; lists are walked through.</param>
internal sealed record SearchParameter(string Name, SearchKind Kind, string? Target, params string[] Paths)
{
    private static readonly Dictionary<string, SearchParameter[]> s_byType = Table();

    /// <summary>Parameters of a type. A type without a row of its own has identifier and status only.</summary>
    public static SearchParameter[] Of(string type) => s_byType.TryGetValue(type, out var own) ? own : s_byType[""];

    public static IEnumerable<string> Types => s_byType.Keys.Where(k => k.Length > 0);

    // Names and paths as in the R4 search parameter registry (hl7.org/fhir/R4/searchparameter-registry.html).
    private static Dictionary<string, SearchParameter[]> Table()
    {
        SearchParameter identifier = Token("identifier"), status = Token("status"), code = Token("code"), category = Token("category");
        SearchParameter[] subject = [Reference("subject"), new("patient", SearchKind.Reference, "Patient", "subject")];
        var encounter = Reference("encounter");
        return new(StringComparer.Ordinal)
        {
            [""] = [identifier, status],
            ["Observation"] = [identifier, status, code, category, .. subject, encounter, Date("date", "effectiveDateTime", "effectivePeriod", "effectiveInstant"),
                Reference("device"), Reference("specimen"), Reference("derived-from", "derivedFrom"), Reference("has-member", "hasMember"), Reference("performer"), Token("method")],
            ["DiagnosticReport"] = [identifier, status, code, category, .. subject, encounter, Date("date", "effectiveDateTime", "effectivePeriod"), Reference("result"), Reference("specimen")],
            ["Provenance"] = [Reference("target"), new("patient", SearchKind.Reference, "Patient", "target"), Reference("entity", "entity.what"), Reference("agent", "agent.who"), Date("recorded", "recorded")],
            ["Patient"] = [identifier, Token("active"), Token("gender"), Date("birthdate", "birthDate"), Reference("link", "link.other")],
            ["Encounter"] = [identifier, status, Token("class"), .. subject, Date("date", "period"), Reference("location", "location.location")],
            ["Specimen"] = [identifier, status, Token("type"), .. subject, Date("collected", "collection.collectedDateTime", "collection.collectedPeriod")],
            ["Device"] = [identifier, status, Token("type"), new("patient", SearchKind.Reference, "Patient", "patient")],
            ["DeviceMetric"] = [identifier, Token("category"), Token("type"), Reference("source"), Reference("parent")],
            ["Procedure"] = [identifier, status, code, category, .. subject, encounter, Date("date", "performedDateTime", "performedPeriod")],
            ["Condition"] = [identifier, code, category, .. subject, encounter],
            ["Library"] = [identifier, status, Token("version"), Token("url")],
            ["AuditEvent"] = [Token("type"), Reference("entity", "entity.what"), Date("date", "recorded")],
            ["Subscription"] = [status, Token("type", "channel.type"), Token("url", "channel.endpoint")],
        };
    }

    private static SearchParameter Token(string name, string? path = null) => new(name, SearchKind.Token, null, path ?? name);

    private static SearchParameter Reference(string name, string? path = null) => new(name, SearchKind.Reference, null, path ?? name);

    private static SearchParameter Date(string name, params string[] paths) => new(name, SearchKind.Date, null, paths);
}
