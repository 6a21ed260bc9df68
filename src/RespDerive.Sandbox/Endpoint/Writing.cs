using System.Text.Json.Nodes;
using RespDerive.Sandbox.Search;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>create, update and delete with their conditions (R4 RESTful API).</summary>
internal sealed class Writing(ResourceStore store, Faults faults, bool validate, string baseUrl)
{
    public FhirAnswer Create(FhirRequest request, string type) =>
        Create(type, Body(request, type), request.IfNoneExist, newId: null);

    public FhirAnswer Update(FhirRequest request, string type, string id)
    {
        var resource = Body(request, type);
        RequireId(resource, id);
        return Update(type, id, resource, request.IfMatch);
    }

    public FhirAnswer ConditionalUpdate(FhirRequest request, string type)
    {
        var resource = Body(request, type);
        return store.Write(() =>
        {
            var given = resource.Text("id");
            return Matching(type, request.Query) switch
            {
                [] when given is null => Create(type, resource, null, null),
                [] => Update(type, given, resource, request.IfMatch),
                [var one] when given is null || given == one.Id => Update(type, one.Id, resource, request.IfMatch),
                [var one] => throw Refusal.BadRequest($"the body has id {given}, the match is {one.Reference}"),
                _ => throw Refusal.Precondition("the condition matches more than one resource"),
            };
        });
    }

    /// <summary>Delete succeeds also when there is nothing (left) to delete.</summary>
    public FhirAnswer Delete(string type, string id, string? ifMatch) => store.Write(() =>
    {
        var current = store.Current(type, id);
        Preconditions.Require(ifMatch, current);
        return current is null or { Deleted: true }
            ? new FhirAnswer(204, [])
            : new FhirAnswer(204, []) { About = store.Append(type, id, "DELETE", null) };
    });

    /// <summary>Current resources that meet a condition; a condition without a usable parameter is refused.</summary>
    public List<StoredVersion> Matching(string type, string condition)
    {
        var query = SearchQuery.Parse(type, "?" + condition.TrimStart('?'), baseUrl);
        return query.HasCriteria && query.Ignored.Count == 0
            ? store.Find(query)
            : throw Refusal.Precondition("the condition has no parameter, or one that is not supported");
    }

    /// <summary>What a conditional create sees; nothing when a race is switched on.</summary>
    public IReadOnlyList<StoredVersion> Seen(string type, string condition) => faults.TakeRace() ? [] : Matching(type, condition);

    public FhirAnswer Create(string type, JsonObject resource, string? ifNoneExist, string? newId)
    {
        Check(resource);
        return store.Write(() =>
        {
            if (ifNoneExist is not null)
            {
                switch (Seen(type, ifNoneExist))
                {
                    case []:
                        break;
                    case [var one]:
                        return Written(one, 200);
                    default:
                        throw Refusal.Precondition("If-None-Exist matches more than one resource");
                }
            }
            return Written(store.Append(type, newId ?? store.NewId(type), "POST", resource), 201);
        });
    }

    public FhirAnswer Update(string type, string id, JsonObject resource, string? ifMatch)
    {
        if (!ResourceRules.IsId(id))
        {
            throw Refusal.BadRequest($"'{id}' is not a FHIR id");
        }
        Check(resource);
        return store.Write(() =>
        {
            var current = store.Current(type, id);
            Preconditions.Require(ifMatch, current);
            return Written(store.Append(type, id, "PUT", resource), current is null or { Deleted: true } ? 201 : 200);
        });
    }

    public static void RequireId(JsonObject resource, string id)
    {
        if (resource.Text("id") != id)
        {
            throw Refusal.BadRequest($"the body's id must be '{id}'");
        }
    }

    private void Check(JsonObject resource)
    {
        if (validate)
        {
            ResourceRules.Check(resource);
        }
        if (resource.Text("resourceType") == "Subscription")
        {
            Notifications.SubscriptionText.RequireClientStatus(resource);
        }
    }

    private static JsonObject Body(FhirRequest request, string type)
    {
        if (request.ContentType is { } sent && !sent.Contains("json", StringComparison.OrdinalIgnoreCase))
        {
            throw new Refusal(415, "not-supported", "only application/fhir+json is accepted");
        }
        var resource = ResourceJson.Parse(request.Body);
        ResourceRules.RequireType(resource, type);
        return resource;
    }

    private FhirAnswer Written(StoredVersion version, int status) =>
        FhirAnswer.Of(version, status) with { Location = $"{baseUrl}/{version.VersionedReference}" };
}
