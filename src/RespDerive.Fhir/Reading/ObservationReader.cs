using System.Text.Json;

namespace RespDerive.Fhir;

/// <summary>Facts of an Observation.</summary>
internal static class ObservationReader
{
    public static ObservationFacts Read(JsonElement root, References references) => new()
    {
        Status = root.Text("status"),
        Categories = root.Codes("category"),
        Own = Part(root),
        Components = [.. root.Each("component").Select(Part)],
        Effective = TypeReader.Effective(root, "effective"),
        Issued = root.Text("issued"),
        Specimen = references.Key(root.Get("specimen")),
        Device = references.Key(root.Get("device")),
        Encounter = references.Key(root.Get("encounter")),
        Members = references.Keys(root.Each("hasMember")),
    };

    private static PartFacts Part(JsonElement element) =>
        new(element.Codes("code"), Value(element), Absent(element));

    private static string? Absent(JsonElement element)
    {
        if (element.Get("dataAbsentReason") is not { } reason)
        {
            return null;
        }

        return element.Codes("dataAbsentReason").Select(code => code.Code).FirstOrDefault() ?? reason.Text("text") ?? "unknown";
    }

    private static ValueFact? Value(JsonElement element)
    {
        // Two values, or one sent twice, are no value: which one is meant cannot be known.
        var values = element.EnumerateObject().Where(property => property.Name.StartsWith("value", StringComparison.Ordinal)
            && property.Value.ValueKind != JsonValueKind.Null).ToList();
        if (values.Count != 1)
        {
            return values.Count == 0 ? null : new OtherValueFact("several values");
        }

        var (name, value) = (values[0].Name, values[0].Value);
        return (name, value.ValueKind) switch
        {
            ("valueQuantity", JsonValueKind.Object) => Quantity(value),
            ("valueCodeableConcept", JsonValueKind.Object) => new ConceptFact(element.Codes(name), value.Text("text") ?? Display(value)),
            ("valueString", JsonValueKind.String) => new ConceptFact([], element.Text(name)),
            ("valueBoolean", JsonValueKind.True or JsonValueKind.False) => new ConceptFact([], value.ValueKind == JsonValueKind.True ? "true" : "false"),
            _ => new OtherValueFact(name),
        };
    }

    private static string? Display(JsonElement concept) => concept.Each("coding").Select(coding => coding.Text("display")).FirstOrDefault(text => text is not null);

    private static QuantityFact Quantity(JsonElement quantity)
    {
        var number = quantity.Number("value");
        return new(number, quantity.Get("comparator") is null && (number is not null || quantity.Get("value") is null),
            quantity.Text("unit")?.Trim(), quantity.Text("system")?.Trim(), quantity.Text("code")?.Trim());
    }
}
