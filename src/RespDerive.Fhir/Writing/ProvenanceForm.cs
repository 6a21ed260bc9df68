using System.Globalization;
using Hl7.Fhir.Model;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;
using Outcome = RespDerive.Timeline.Outcome;

namespace RespDerive.Fhir.Writing;

/// <summary>The Provenance that says how one edition of a result came to be, fully enough to recompute it.</summary>
internal sealed class ProvenanceForm(RenderOptions options, Vocabulary words, References references, ObservationForm observations)
{
    public Provenance Of(Outcome outcome, Definition definition, Edition edition, string target, ResourceReference device, string digest)
    {
        var id = Id(outcome, edition, digest);
        var provenance = new Provenance
        {
            Id = options.UsePutIds ? id.ToString() : null,
            Target = [new ResourceReference(target) { Extension = [new Extension(words.ResultRevision, new PositiveInt(edition.Revision))] }],
            Occurred = new FhirDateTime(ObservationForm.Effective(outcome)),
            Recorded = edition.Recorded,
            Policy = [$"{words.Definition(definition.Key)}|{outcome.Revision.ToString(CultureInfo.InvariantCulture)}"],
            Activity = Activity(edition),
            Agent =
            [
                new Provenance.AgentComponent
                {
                    Type = new CodeableConcept(Vocabulary.ParticipantType, "assembler", "Assembler", null),
                    Who = device,
                    OnBehalfOf = options.Organization is { } organization ? new ResourceReference(organization) : null,
                },
            ],
            Entity = [.. Entities(outcome, edition)],
        };

        if (outcome.Policy.Length > 0)
        {
            provenance.PolicyElement.Add(new FhirUri($"{words.Policy}|{outcome.Policy}"));
        }

        // A string: servers rewrite any uri or uuid that equals the address of an entry of the transaction.
        provenance.AddExtension(words.ProvenanceId, new FhirString(id.ToString()));
        provenance.AddExtension(words.ContentDigest, new FhirString(digest));
        if (edition is { IsRetraction: true, Withheld: { } code })
        {
            provenance.AddExtension(words.WithheldReason, new Coding(words.Withheld, code, Withheld.Text(code)));
        }

        foreach (var evidence in Evidence(outcome))
        {
            provenance.AddExtension(words.GateEvidence, evidence);
        }

        return provenance;
    }

    /// <summary>Id of the Provenance of one edition: the same content recorded again has the same id.</summary>
    private static Guid Id(Outcome outcome, Edition edition, string digest) =>
        NameBasedUuid.Of(outcome.Identity, "provenance", edition.Revision.ToString(CultureInfo.InvariantCulture), digest);

    private static CodeableConcept Activity(Edition edition) => edition switch
    {
        { IsRetraction: true } => new(Vocabulary.DataOperation, "NULLIFY", "nullify", null),
        { Revision: > 1 } => new(Vocabulary.DataOperation, "UPDATE", "revise", null),
        _ => new(Vocabulary.DataOperation, "CREATE", "create", null),
    };

    private IEnumerable<Provenance.EntityComponent> Entities(Outcome outcome, Edition edition)
    {
        var used = outcome.Inputs.Where(input => !input.GateOnly).SelectMany(input => input.Readings.Select(reading => (Input: input, Reading: reading)));
        foreach (var version in used.GroupBy(pair => (pair.Reading.Resource, pair.Reading.Version)))
        {
            var first = version.First().Reading;
            yield return Source(first, version.Select(pair => Value(pair.Input, pair.Reading)));
        }

        if (outcome.Person is { } person && !used.Any(pair => pair.Reading.Resource == person.Resource))
        {
            var properties = outcome.Inputs.Where(input => input.Readings.Count == 0 && Kinds.Find(input.Kind)?.Origin == Origin.Demographic && !input.GateOnly);
            yield return Source(person, properties.Select(input => Value(input, person with { Value = input.Value })));
        }

        var id = options.UsePutIds ? outcome.Identity.ToString() : edition.ServerId;
        if (id is not null && edition is { Revision: > 1, PreviousVersion: { } previous })
        {
            yield return new Provenance.EntityComponent
            {
                Role = Provenance.ProvenanceEntityRole.Revision,
                What = new ResourceReference($"Observation/{id}/_history/{previous}"),
            };
        }
    }

    private Provenance.EntityComponent Source(UsedReading reading, IEnumerable<Extension> values)
    {
        var entity = new Provenance.EntityComponent { Role = Provenance.ProvenanceEntityRole.Source, What = references.Version(reading) };
        entity.AddExtension(words.InputVersion, new FhirString(reading.Version));
        entity.Extension.AddRange(values);
        return entity;
    }

    private Extension Value(UsedInput input, UsedReading reading)
    {
        var value = new Extension { Url = words.ValueUsed };
        value.AddExtension("kind", new Code(input.Kind));
        if (reading.Part.Length > 0)
        {
            value.AddExtension("part", new FhirString(reading.Part));
        }

        value.AddExtension("value", input.Code is { } code ? observations.Coded(input.Kind, code) : Numbers.Quantity(Numbers.Exact(reading.Value), input.Unit ?? "1"));
        return value;
    }

    /// <summary>Readings that only a gate looked at; one that the number also rests on is a source, not evidence.</summary>
    private IEnumerable<ResourceReference> Evidence(Outcome outcome)
    {
        var sources = outcome.Inputs.Where(input => !input.GateOnly).SelectMany(input => input.Readings).Select(reading => (reading.Resource, reading.Version)).ToHashSet();
        var seen = outcome.Inputs.Where(input => input.GateOnly).SelectMany(input => input.Readings.Select(reading => (Input: input, Reading: reading)))
            .Where(pair => !sources.Contains((pair.Reading.Resource, pair.Reading.Version))).GroupBy(pair => (pair.Reading.Resource, pair.Reading.Version));
        foreach (var version in seen)
        {
            var reference = references.Version(version.First().Reading);
            reference.Display = string.Join(", ", version.Select(pair => Kinds.Find(pair.Input.Kind)?.Name ?? pair.Input.Kind).Distinct());
            yield return reference;
        }
    }
}
