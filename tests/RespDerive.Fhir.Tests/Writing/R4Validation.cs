using System.Text.Json;
using Firely.Fhir.Validation;
using Hl7.Fhir.Model;
using Hl7.Fhir.Serialization;
using Hl7.Fhir.Specification.Source;
using Hl7.Fhir.Specification.Terminology;
using Hl7.Fhir.Support;
using RespDerive.Fhir.Writing;

namespace RespDerive.Fhir.Tests.Writing;

/// <summary>
/// The R4 4.0.1 definitions and a general-purpose validator: an oracle that is not ours. One for all tests, since the first validation
/// compiles the definitions; used under a lock, since the validator is not thread safe.
/// </summary>
public sealed class R4Validation
{
    private readonly Lock _lock = new();
    private readonly Validator _validator;
    private readonly CachedResolver _source = new(ZipSource.CreateValidationSource());

    public R4Validation()
    {
        _validator = new Validator(_source, LocalTerminologyService.CreateDefaultForCore(_source), null, null);
    }

    /// <summary>Writes, reads back strictly, validates; fails with every error and every warning that is not about our own extensions.</summary>
    public void Accepts(Resource resource)
    {
        var read = Strict(FhirJson.Bytes(resource));
        lock (_lock)
        {
            var outcome = _validator.Validate(read);
            Assert.Equal([], outcome.Issue.Where(Matters).Select(issue => issue.ToString()));
        }
    }

    /// <summary>The published display of a code.</summary>
    public async Task<string?> DisplayAsync(string system, string code) =>
        (await _source.ResolveByCanonicalUriAsync(system) as CodeSystem)?.Concept.SelectMany(All).SingleOrDefault(concept => concept.Code == code)?.Display;

    private static IEnumerable<CodeSystem.ConceptDefinitionComponent> All(CodeSystem.ConceptDefinitionComponent concept) => concept.Concept.SelectMany(All).Prepend(concept);

    /// <summary>Errors and warnings; not that our own extensions have no published definition.</summary>
    private static bool Matters(OperationOutcome.IssueComponent issue) => issue.Severity is not OperationOutcome.IssueSeverity.Information
        && !(issue.Severity == OperationOutcome.IssueSeverity.Warning && issue.Details?.Text?.Contains("extension 'https://respderive.example/", StringComparison.Ordinal) == true);

    /// <summary>Reads with every check of the SDK.</summary>
    public static Resource Strict(byte[] json)
    {
        var reader = new Utf8JsonReader(json);
        return FhirJsonDeserializer.STRICT.TryDeserializeResource(ref reader, out var resource, out var errors)
            ? resource!
            : throw new InvalidOperationException(string.Join("; ", errors.Select(error => error.Message)));
    }
}

[CollectionDefinition(nameof(R4Validation))]
public sealed class R4ValidationShared : ICollectionFixture<R4Validation>;
