using System.Globalization;
using RespDerive.Physiology;
using RespDerive.Sandbox.Patients;
using RespDerive.Timeline;

namespace RespDerive.Demo;

/// <summary>The demo's terminal: what came in, what was derived, what was withheld and why; streams are counted, not listed.</summary>
internal sealed class Screen(TextWriter writer)
{
    private readonly Lock _lock = new();
    private readonly Dictionary<string, string> _names = new(StringComparer.Ordinal);
    private readonly HashSet<(string Patient, string Definition, string Code)> _withheld = [];
    private long _streamed;
    private long _posted;
    private long _held;

    public void Line(string text)
    {
        lock (_lock)
        {
            writer.WriteLine(text);
        }
    }

    public void Start(string sandbox, string service, string folder)
    {
        Line("RespDerive demo: an invented ward with invented patients, faster than real time. Derived numbers are arithmetic on charted");
        Line("inputs; they are no diagnosis, no alarm and no order.");
        Line("in: charted · =: derived (± one standard uncertainty) · rev: revised · back: retracted · held: withheld, and why");
        Line($"FHIR endpoint {sandbox} · service {service} · store in {folder}");
        Line("");
        Line("time   patient          what");
    }

    /// <summary>A message reached the record.</summary>
    public void CameIn(ScenarioEvent message)
    {
        lock (_lock)
        {
            _names[message.Patient] = message.PatientName;
            if (message.Kind is WardEventKind.Measurement or WardEventKind.Duplicate)
            {
                _streamed++;
                if (_streamed % 1000 == 0)
                {
                    writer.WriteLine(string.Create(CultureInfo.InvariantCulture, $"       {"",-16} … {_streamed:N0} streamed measurements, {_posted:N0} results posted, {_held:N0} values withheld so far"));
                }

                return;
            }

            if (message.Kind != WardEventKind.Standing)
            {
                var late = message.FilingTime - message.EventTime;
                Row(message.EventTime, message.Patient, "in    " + message.Summary + (late > TimeSpan.FromMinutes(2) ? $" (filed {late.TotalMinutes:F0} min late)" : ""));
            }
        }
    }

    /// <summary>A turn of a patient was committed.</summary>
    public void Turned(TurnChanges changes)
    {
        lock (_lock)
        {
            foreach (var change in changes.Outcomes.OrderBy(change => (change.Now ?? change.Before)!.At).ThenBy(change => (change.Now ?? change.Before)!.Definition, StringComparer.Ordinal))
            {
                Show(change);
            }
        }
    }

    /// <summary>The server took an edition.</summary>
    public void Delivered(Outcome outcome, int revision)
    {
        lock (_lock)
        {
            _posted++;
        }
    }

    /// <summary>The server refused a result for good.</summary>
    public void Parked(string code, string text) => Line($"       {"",-16} refused by the server and parked: {code} ({text})");

    private void Show(OutcomeChange change)
    {
        var before = change.Before is { Withheld: null } ? Value(change.Before) : null;
        var outcome = (change.Now ?? change.Before)!;
        if (change.Now is { Withheld: null } now)
        {
            var flags = now.Flags.Count > 0 ? $"  [{string.Join(", ", now.Flags)}]" : "";
            Row(outcome.At, outcome.Patient, before is null ? $"=     {Name(outcome)} {Value(now)}{flags}" : $"rev   {Name(outcome)} {Value(now)}, {Why(now, before)}{flags}");
        }
        else if (before is not null)
        {
            Row(outcome.At, outcome.Patient, $"back  {Name(outcome)} {before} is retracted: {change.Now?.Withheld ?? "its anchor was withdrawn"}");
        }
        else if (change.Now is { Withheld: { } code })
        {
            _held++;
            if (_withheld.Add((outcome.Patient, outcome.Definition, code)))
            {
                Row(outcome.At, outcome.Patient, $"held  {Name(outcome)}: {code} ({Files.DeriveOutput.Text(outcome)})");
            }
        }
    }

    private void Row(DateTimeOffset at, string patient, string text) =>
        writer.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{at:HH:mm}  {_names.GetValueOrDefault(patient, patient),-16} {text}"));

    private static string Why(Outcome now, string before) =>
        Value(now) == before ? "same number on other evidence" : $"was {before}{(now.InputCorrected ? " (an input was corrected)" : "")}";

    private static string Name(Outcome outcome) => outcome.Definition;

    private static string Value(Outcome outcome)
    {
        if (outcome.Code is { } code)
        {
            return code;
        }

        var decimals = Catalogue.Shipped.Find(outcome.Definition)?.Decimals ?? 0;
        var unit = outcome.Unit == "1" ? "" : " " + outcome.Unit;
        return $"{Publication.Text(outcome.Published!.Value, decimals)}{unit} ± {outcome.Uncertainty!.Value.ToString("G2", CultureInfo.InvariantCulture)}";
    }
}
