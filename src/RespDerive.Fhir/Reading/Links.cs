namespace RespDerive.Fhir;

/// <summary>What an Observation refers to, looked up: specimen, device, panels.</summary>
internal sealed class Links
{
    private readonly List<string> _unresolved = [];

    public Links(ResourceFacts facts, ObservationFacts observation, IResourceSet set)
    {
        var panels = set.PanelsOf(facts.Key.Reference).Where(panel => !IsWithdrawn(panel)).ToList();
        Panels = [.. panels.Select(panel => panel.Key.Reference).Order(StringComparer.Ordinal)];
        if (observation.Components.Count + observation.Members.Count > 0)
        {
            // Its own value, its components and its members belong together.
            Panels = [.. Panels.Append(facts.Key.Reference).Distinct().Order(StringComparer.Ordinal)];
        }

        // A logical reference becomes the one of the resource it names, so that both are equal.
        (string? Reference, TypeFacts? Content) Look(string? reference)
        {
            if (reference is null)
            {
                return (null, null);
            }

            if (facts.Contained.TryGetValue(reference, out var contained))
            {
                return (reference, contained);
            }

            if (set.Find(reference) is { } found)
            {
                return (found.Key.Reference, found.Content);
            }

            _unresolved.Add(reference);
            return (reference, null);
        }

        (Patient, _) = Look(facts.Patient);
        (Encounter, _) = Look(observation.Encounter);
        (SpecimenReference, var specimen) = Look(observation.Specimen ?? OnlyOne(panels.SelectMany(SpecimensOf)));
        Specimen = specimen is SpecimenFacts { Status: not "entered-in-error" } valid ? valid : null;
        Device = observation.Device;
        if (Device?.StartsWith("Device/", StringComparison.Ordinal) == false)
        {
            (Device, var metric) = Look(Device);
            Metric = metric as DeviceMetricFacts;
            Device = Metric?.Source ?? Device;
        }
    }

    /// <summary>The patient.</summary>
    public string? Patient { get; }

    /// <summary>The encounter.</summary>
    public string? Encounter { get; }

    /// <summary>The specimen named by the Observation, else the only one its panels and reports name.</summary>
    public string? SpecimenReference { get; }

    /// <summary>The specimen; null when it is not known or entered in error.</summary>
    public SpecimenFacts? Specimen { get; }

    /// <summary>The device, behind the metric where there is one.</summary>
    public string? Device { get; }

    /// <summary>The metric; null when there is none or it is not known.</summary>
    public DeviceMetricFacts? Metric { get; }

    /// <summary>Panels and reports it belongs to, itself among them when it has parts.</summary>
    public IReadOnlyList<string> Panels { get; }

    /// <summary>References that were not found.</summary>
    public IReadOnlyList<string> Unresolved => [.. _unresolved.Distinct()];

    private static string? OnlyOne(IEnumerable<string> references) =>
        references.Distinct().Take(2).ToList() is [var single] ? single : null;

    private static IEnumerable<string> SpecimensOf(ResourceFacts panel) => panel.Content switch
    {
        ReportFacts report => report.Specimens,
        ObservationFacts { Specimen: { } specimen } => [specimen],
        _ => [],
    };

    private static bool IsWithdrawn(ResourceFacts panel) => panel.Content switch
    {
        ReportFacts report => Persons.IsWithdrawn(report.Status),
        ObservationFacts observation => Persons.IsWithdrawn(observation.Status),
        _ => false,
    };
}
