using System.Globalization;
using Hl7.Fhir.Model;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;
using Outcome = RespDerive.Timeline.Outcome;

namespace RespDerive.Fhir.Writing;

/// <summary>The Observation that carries a result.</summary>
internal sealed class ObservationForm(Catalogue catalogue, RenderOptions options, Vocabulary words, References references)
{
    public Observation Of(Outcome outcome, Definition definition, Edition edition, ResourceReference device)
    {
        var observation = new Observation
        {
            Id = options.UsePutIds ? outcome.Identity.ToString() : edition.ServerId,
            Identifier = [new Identifier(words.Result, outcome.Identity.ToString())],
            Status = Status(edition.Status),
            Category = Categories(),
            Code = Code(definition),
            Subject = references.Context(outcome.Patient, outcome.Anchor),
            Encounter = outcome.Encounter is { } encounter ? references.Context(encounter, outcome.Anchor) : null,
            Effective = new FhirDateTime(Effective(outcome)),
            Issued = edition.Recorded,
            Method = Method(outcome, definition, edition),
            Device = options.OmitDevice ? null : device,
            DerivedFrom = [.. Sources(outcome).Select(references.Version)],
        };

        if (edition.IsRetraction)
        {
            observation.DataAbsentReason = new CodeableConcept(Vocabulary.DataAbsentReason, "error", "Error", null);
            observation.Note = [new Annotation { Text = new Markdown(Reason(edition)) }];
            return observation;
        }

        observation.Value = Value(outcome, definition);
        observation.Extension = [.. outcome.Flags.Select(flag => new Extension(words.FlagExtension, new Coding(words.Flag, flag, Flags.Text(flag))))];
        observation.Note = [.. Notes(outcome, definition)];
        observation.Component = [.. Components(outcome)];
        return observation;
    }

    /// <summary>Source Observations the number rests on, once each, in the order of the formula; the anchor when nothing else is known.</summary>
    public static IEnumerable<UsedReading> Sources(Outcome outcome)
    {
        var all = outcome.Inputs.Where(input => !input.GateOnly).SelectMany(input => input.Readings)
            .Where(reading => reading.Resource.Type == "Observation").DistinctBy(reading => (reading.Resource, reading.Version)).ToList();
        return all.Count > 0 ? all : [outcome.Anchor];
    }

    /// <summary>A coded value of a kind.</summary>
    public CodeableConcept Coded(string kind, string code, string? text = null) =>
        new() { Coding = [new Coding(words.CodedValue, $"{kind}.{code.Replace(' ', '-')}", text ?? code)], Text = text ?? code };

    private static ObservationStatus Status(EditionStatus status) => status switch
    {
        EditionStatus.Preliminary => ObservationStatus.Preliminary,
        EditionStatus.Final => ObservationStatus.Final,
        EditionStatus.Amended => ObservationStatus.Amended,
        EditionStatus.Corrected => ObservationStatus.Corrected,
        _ => ObservationStatus.EnteredInError,
    };

    private List<CodeableConcept> Categories()
    {
        var own = new CodeableConcept(words.Category, "derived-respiratory", "Derived respiratory value", null);
        return options.ProcedureCategory ? [own, new CodeableConcept(Vocabulary.ObservationCategory, "procedure", "Procedure", null)] : [own];
    }

    /// <summary>LOINC first where a verified code exists, ours always, then any exact code of another terminology.</summary>
    private CodeableConcept Code(Definition definition)
    {
        var standard = definition.Codes.Select(code => new Coding(code.System, code.Code, code.Display)).ToLookup(coding => coding.System == Vocabulary.Loinc);
        return new CodeableConcept
        {
            Coding = [.. standard[true], new Coding(words.DerivedValue, definition.Key, definition.Result.Name), .. standard[false]],
            Text = $"{Capital(definition.Result.Name)} ({definition.Result.Symbol})",
        };
    }

    /// <summary>The anchor's string as sent; where that is no FHIR dateTime (no zone, a blank for the T), the event time it was read as.</summary>
    public static string Effective(Outcome outcome) => FhirDateTime.IsValidValue(outcome.AtText)
        ? outcome.AtText
        : outcome.At.ToString("yyyy-MM-dd'T'HH:mm:ss.FFFFFFFzzz", CultureInfo.InvariantCulture);

    private CodeableConcept Method(Outcome outcome, Definition definition, Edition edition)
    {
        var revision = outcome.Revision.ToString(CultureInfo.InvariantCulture);
        var code = outcome.Variant is null ? definition.Key : $"{definition.Key}.{outcome.Variant}";
        var variant = outcome.Variant is { } name ? $", variant {name}" : "";
        var method = new CodeableConcept
        {
            Coding = [new Coding(words.Method, code, definition.Equation) { Version = revision }],
            Text = $"{definition.Equation}; definition {definition.Key}, revision {revision}{variant}.",
        };
        if (outcome.Uncertainty is not null && !edition.IsRetraction)
        {
            method.Text += outcome.SiteTolerance
                ? " Standard uncertainty (k = 1) from the site's own accuracy figures, generic limits where it gives none."
                : " Standard uncertainty (k = 1) from generic accuracy limits of devices and analysers.";
            method.AddExtension(words.UncertaintyBasis, new Code(outcome.SiteTolerance ? "site" : "generic"));
        }

        return method;
    }

    private DataType Value(Outcome outcome, Definition definition)
    {
        if (outcome.Code is { } code)
        {
            return Coded(definition.Key, code, (definition as Classification)?.Text(code));
        }

        var published = outcome.Published ?? throw new ArgumentException("A withheld outcome has no value to publish.", nameof(outcome));
        var quantity = Numbers.Quantity(Numbers.Published(published, definition.Decimals), outcome.Unit ?? definition.Result.Unit!);
        if (outcome.Uncertainty is { } uncertainty)
        {
            quantity.AddExtension(Vocabulary.Uncertainty, new FhirDecimal(Numbers.Uncertainty(uncertainty)));
        }

        return quantity;
    }

    private static IEnumerable<Annotation> Notes(Outcome outcome, Definition definition)
    {
        if (outcome.Flags.Count > 0)
        {
            yield return new Annotation { Text = new Markdown("Flagged: " + string.Join(' ', outcome.Flags.Select(Flags.Text))) };
        }

        // The definition's own words first: they are about this number.
        var no = definition.Caution.Contains("diagnosis", StringComparison.Ordinal) ? "no alarm and no order" : "no diagnosis, no alarm and no order";
        yield return new Annotation
        {
            Text = new Markdown($"{definition.Caution} Arithmetic on charted values, {no}: check it against the patient and the values it rests on. Local policy and licensed clinicians decide."),
        };
    }

    private IEnumerable<Observation.ComponentComponent> Components(Outcome outcome)
    {
        foreach (var step in outcome.Intermediates)
        {
            var name = catalogue.Find(step.Definition)?.Result.Name ?? step.Definition;
            yield return new Observation.ComponentComponent
            {
                Code = new CodeableConcept(words.DerivedValue, step.Definition, name, Capital(name)),
                Value = Numbers.Quantity(Numbers.Shown(step.Value), step.Unit),
            };
        }

        foreach (var input in outcome.Inputs.Where(input => !input.GateOnly))
        {
            var name = Name(input.Kind);
            var component = new Observation.ComponentComponent
            {
                Code = new CodeableConcept(words.InputValue, input.Kind, name, Capital(name) + Aside(input)),
                Value = input.Code is { } code ? Coded(input.Kind, code) : Numbers.Quantity(Numbers.Shown(input.Value), input.Unit ?? "1"),
            };
            if (input.GapMinutes is { } gap)
            {
                component.AddExtension(words.GapMinutes, new FhirDecimal(Numbers.Shown(Math.Round(gap, 2))));
            }

            if (input.Assumed)
            {
                component.AddExtension(words.Assumed, new FhirBoolean(true));
            }

            yield return component;
        }
    }

    /// <summary>What a reader of a plain list needs beside the value.</summary>
    private static string Aside(UsedInput input) => input switch
    {
        { Assumed: true } when input.Kind == Kinds.BarometricPressure.Key => " (site policy)",
        { Assumed: true } => " (assumed)",
        { GapMinutes: <= -1 and { } before } => $" ({Minutes(-before)} min before)",
        { GapMinutes: >= 1 and { } after } => $" ({Minutes(after)} min after)",
        _ => "",
    };

    private static string Minutes(double minutes) => Math.Round(minutes).ToString(CultureInfo.InvariantCulture);

    private string Name(string kind) => Kinds.Find(kind)?.Name ?? catalogue.Find(kind)?.Result.Name ?? kind;

    private static string Reason(Edition edition) => edition.IsSecondCopy
        ? "Withdrawn: a second copy of one result; the other copy stands."
        : "Withdrawn: the value published before no longer stands. " + (edition.Withheld is { } code ? Withheld.Text(code) : "A value it rested on was withdrawn or replaced.");

    private static string Capital(string text) => text.Length == 0 ? text : char.ToUpperInvariant(text[0]) + text[1..];
}
