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

    public R4Validation()
    {
        var source = new CachedResolver(ZipSource.CreateValidationSource());
        _validator = new Validator(source, LocalTerminologyService.CreateDefaultForCore(source), null, null);
    }

    /// <summary>Writes, reads back strictly, validates; fails with every error.</summary>
    public void Accepts(Resource resource)
    {
        var read = Strict(FhirJson.Bytes(resource));
        lock (_lock)
        {
            var outcome = _validator.Validate(read);
            Assert.Equal([], outcome.Issue.Where(issue => issue.Severity is OperationOutcome.IssueSeverity.Error or OperationOutcome.IssueSeverity.Fatal).Select(issue => issue.ToString()));
            Warnings.AddRange(outcome.Issue.Where(issue => issue.Severity == OperationOutcome.IssueSeverity.Warning).Select(issue => issue.ToString()));
        }
    }

    /// <summary>What was said beyond errors.</summary>
    public List<string?> Warnings { get; } = [];

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
