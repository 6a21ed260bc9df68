using Hl7.Fhir.Model;
using RespDerive.Timeline;

namespace RespDerive.Fhir.Writing;

/// <summary>References to what a result rests on.</summary>
internal sealed class References(RenderOptions options, Vocabulary words)
{
    /// <summary>One version of an input: a version-specific reference where the target holds it, and always the identifier that survives a stripped reference.</summary>
    public ResourceReference Version(UsedReading reading)
    {
        var key = reading.Resource;
        var reference = new ResourceReference
        {
            Type = key.Type,
            Identifier = new Identifier(words.Input, $"{Origin(reading)}|{key.Type}|{key.Id}|{reading.Version}"),
        };

        // A urn: of a Bundle entry means nothing outside that Bundle.
        if (options.TargetHoldsInputs && !key.Reference.StartsWith("urn:", StringComparison.Ordinal))
        {
            reference.Reference = $"{key.Reference}/_history/{reading.Version}";
        }

        return reference;
    }

    /// <summary>A patient or encounter, as the anchor referred to it.</summary>
    public ResourceReference Context(string reference, UsedReading anchor)
    {
        if (options.TargetHoldsInputs)
        {
            return new ResourceReference(reference);
        }

        var parts = reference.Split('/');
        return new ResourceReference
        {
            Type = parts.Length > 1 ? parts[^2] : null,
            Identifier = new Identifier(words.Source, parts.Length > 1 ? $"{Origin(anchor)}|{parts[^2]}|{parts[^1]}" : $"{Origin(anchor)}|{reference}"),
        };
    }

    private static string Origin(UsedReading reading) => reading.Base.Length > 0 ? reading.Base : reading.Resource.Source;
}
