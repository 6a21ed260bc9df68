using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Fhir;

/// <summary>The readings of one Observation: its own value and each component that is known.</summary>
internal sealed class ObservationRules
{
    private readonly ResourceFacts _facts;
    private readonly ObservationFacts _observation;
    private readonly Meaning _meaning;
    private readonly Quantities _quantities;
    private readonly SourceReading _source;
    private readonly EventTimes _times;
    private readonly Links _links;
    private readonly Surroundings _around;

    public ObservationRules(ResourceFacts facts, ObservationFacts observation, IResourceSet set, Meaning meaning, Quantities quantities, ReadingOptions options)
    {
        (_facts, _observation, _meaning, _quantities) = (facts, observation, meaning, quantities);
        _source = options.Of(facts.Key.Source);
        _times = new(_source.Zone, options.AllowedFuture, facts);
        _links = new(facts, observation, set);
        _around = new(_links.SpecimenReference is not null || observation.Categories.Any(IsLaboratory), observation.Categories.Any(IsVitalSign),
            _links.Specimen is { } specimen ? meaning.Sample(specimen) : null, _links.Metric?.Category);
    }

    public ReadResult Read()
    {
        var readings = new List<Reading>();
        var ignored = new List<IgnoredPart>();
        foreach (var (name, part) in Parts())
        {
            var meant = _meaning.Of(part, _around);
            if (meant.Kind is { } kind)
            {
                readings.Add(Reading(name, part, kind, meant.Refused));
            }
            else if (name.Length > 0 || part.Value is not null || _observation.Components.Count + _observation.Members.Count == 0)
            {
                ignored.Add(new(name, meant.Ignored!, meant.Key));
            }
        }

        // What is not read yet may be, once its metric or specimen is known.
        var worthFetching = readings.Count > 0 || ignored.Exists(one => one.Key is { } key && Keys.Find(key) is { CanBeRead: true });
        return new() { Readings = readings, Ignored = ignored, Unresolved = worthFetching ? _links.Unresolved : [] };
    }

    /// <summary>Own value first; a component is named by its first code, and by a number when that code comes again.</summary>
    private IEnumerable<(string Name, PartFacts Part)> Parts()
    {
        yield return ("", _observation.Own);
        var times = new Dictionary<string, int>(StringComparer.Ordinal);
        foreach (var component in _observation.Components)
        {
            if (component.Codes.Count > 0)
            {
                var code = component.Codes[0].Code;
                var count = times[code] = times.GetValueOrDefault(code) + 1;
                yield return (count == 1 ? code : $"{code}~{count}", component);
            }
        }
    }

    private Reading Reading(string name, PartFacts part, Kind kind, string? meantRefused)
    {
        var ended = kind == Events.SupportEnd || kind == Events.EncounterEnd;
        var value = ended ? new Converted(0, null, null, null) : _quantities.Convert(kind, part.Value, part.Absent);
        var laboratory = kind.Origin == Origin.Laboratory;
        var time = _times.Of(_observation, kind.Origin, laboratory ? _links.Specimen?.Collected : null);
        var refused = First(_links.Patient is null ? Withheld.NoPatient : null, IsUsable(_observation.Status) ? null : Withheld.InputInvalid,
            meantRefused, value.Refused, time.Refused);
        return new Reading
        {
            Id = new(_facts.Key, name),
            Version = _facts.Version,
            Base = _facts.Base,
            Kind = kind,
            Value = refused is null ? value.Value : double.NaN,
            Given = value.Given,
            GivenUnit = value.GivenUnit,
            At = time.At,
            AtText = time.Text,
            Refused = refused,
            Preliminary = _observation.Status == "preliminary",
            Corrected = _observation.Status is "amended" or "corrected",
            Patient = _links.Patient ?? "",
            Encounter = _links.Encounter,
            Specimen = _links.SpecimenReference,
            Panels = _links.Panels,
            Device = _links.Device,
            Streamed = !laboratory && !_around.Laboratory && (_source.Streamed ?? _links.Device is not null),
            Flags = FlagsOf(time, value, laboratory),
        };
    }

    private string[] FlagsOf(EventTime time, Converted value, bool laboratory)
    {
        var flags = new List<string>(time.Flags);
        if (_facts.Order.IsUnordered)
        {
            flags.Add(Flags.OrderUnknown);
        }

        if (laboratory && _links.SpecimenReference is not null && _links.Specimen is null)
        {
            flags.Add(Flags.SpecimenUnread);
        }

        if (value.Flag is { } flag)
        {
            flags.Add(flag);
        }

        return [.. flags.Order(StringComparer.Ordinal)];
    }

    private static string? First(params string?[] codes) => codes.OfType<string>().MinBy(Withheld.Rank);

    private static bool IsUsable(string? status) => status is "final" or "amended" or "corrected" or "preliminary";

    private static bool IsLaboratory(CodeFact category) =>
        category is { System: CodeSystems.ObservationCategory, Code: "laboratory" } or { System: CodeSystems.Loinc, Code: "26436-6" };

    private static bool IsVitalSign(CodeFact category) => category is { System: CodeSystems.ObservationCategory, Code: "vital-signs" };
}
