using System.Text.Json.Nodes;
using RespDerive.Sandbox.Patients.Gas;

namespace RespDerive.Sandbox.Patients.Charting;

/// <summary>
/// Arterial samples every few hours, filed late. In turn something goes wrong, as on every ward: a correction,
/// a repeated message, a withdrawn sample, a venous sample beside it, a copy typed by hand.
/// </summary>
internal sealed class BloodGases(Chart chart, Profile profile, int bedNumber, Dice dice)
{
    private enum Mishap
    {
        None,
        Corrected,
        Repeated,
        Withdrawn,
        Venous,
        Copied,
    }

    private double _due = dice.Between(0.4, 0.8);
    private int _count;

    public void Write(Moment now, Instruments with, double hoursOfLastChange)
    {
        // Staff let a change of settings settle before they draw, but not for ever.
        if (now.Hours < _due || (now.Hours - hoursOfLastChange < 0.45 && now.Hours < _due + 0.75))
        {
            return;
        }
        _count++;
        var mishap = (Mishap)((_count + (2 * bedNumber)) % 6);
        _due = now.Hours + (mishap == Mishap.Withdrawn ? 0.5 : dice.Between(1.5, 3));
        WriteArterial(now, with, mishap);
        if (mishap == Mishap.Venous)
        {
            WriteVenous(now, with);
        }
    }

    private void WriteArterial(Moment now, Instruments with, Mishap mishap)
    {
        var filed = now.At.AddMinutes(dice.Between(5, 40));
        var effective = profile.AnalysisTime ? filed.AddMinutes(-1.5) : now.At;
        var specimen = chart.NextId("arterial");
        chart.File(WardEventKind.BloodGas, now.At, filed, chart.Bed.Specimen(specimen, now.At, arterial: true), $"arterial sample of {now.At:HH:mm}");
        var units = profile.Units;
        var gas = now.Gas;
        // A withdrawn sample was another patient's, who is worse off in every respect.
        var mixedUp = mishap == Mishap.Withdrawn ? 0.7 : 1;
        var ph = gas.Ph + Math.Log10(mixedUp);
        var po2 = units.Tension(with.PO2(gas.PaO2 * mixedUp));
        (Code Code, string Part, JsonObject Quantity)[] results =
        [
            (Codes.PaO2, "po2", mishap == Mishap.Corrected ? units.Tension(with.PO2(gas.PaO2) * 1.4) : po2),
            (Codes.PaCO2, "pco2", units.Tension(with.PCO2(gas.PaCO2 / mixedUp))),
            (Codes.Ph, "ph", Units.Quantity(with.Ph(ph), 2, "[pH]", "pH")),
            (Codes.SaO2, "so2", Units.Quantity(with.SaO2(Dissociation.Saturation(gas.PaO2 * mixedUp, ph)) * 100, 1, "%")),
        ];
        var written = new List<(Code Code, JsonObject Observation)>();
        foreach (var (code, part, quantity) in results)
        {
            var observation = chart.Bed.Result($"{specimen}-{part}", code, effective, filed, quantity, specimen);
            written.Add((code, observation));
            chart.File(WardEventKind.BloodGas, now.At, filed, code, observation);
        }
        Group(now.At, effective, filed, specimen, written.Select(w => w.Observation["id"]!.GetValue<string>()));
        Follow(mishap, now.At, filed, written, po2);
    }

    private void Group(DateTimeOffset at, DateTimeOffset effective, DateTimeOffset filed, string specimen, IEnumerable<string> results)
    {
        switch (profile.Grouping)
        {
            case Grouping.Report:
                chart.File(WardEventKind.BloodGas, at, filed, chart.Bed.Report($"{specimen}-report", effective, filed, results, specimen), "blood gas report");
                break;
            case Grouping.Panel:
                chart.File(WardEventKind.BloodGas, at, filed, chart.Bed.Panel($"{specimen}-panel", effective, results, specimen), "blood gas panel");
                break;
        }
    }

    private void Follow(Mishap mishap, DateTimeOffset at, DateTimeOffset filed, List<(Code Code, JsonObject Observation)> written, JsonObject po2)
    {
        var later = filed.AddMinutes(dice.Between(15, 45));
        switch (mishap)
        {
            case Mishap.Corrected:
                chart.Correct(at, later, Codes.PaO2, written[0].Observation, po2);
                break;
            case Mishap.Repeated:
                foreach (var (code, observation) in written)
                {
                    chart.File(WardEventKind.Duplicate, at, later, code, (JsonObject)observation.DeepClone(), " (sent again)");
                }
                break;
            case Mishap.Withdrawn:
                foreach (var (code, observation) in written)
                {
                    chart.Withdraw(at, later, code, observation);
                }
                break;
            case Mishap.Copied:
                var copy = chart.Bed.Observation(chart.NextId("po2-charted"), Codes.PaO2, at, (JsonObject)po2.DeepClone());
                chart.File(WardEventKind.Duplicate, at, later, Codes.PaO2, copy, " (typed copy)");
                break;
        }
    }

    private void WriteVenous(Moment now, Instruments with)
    {
        var (at, filed) = (now.At.AddMinutes(3), now.At.AddMinutes(dice.Between(10, 40)));
        var specimen = chart.NextId("venous");
        chart.File(WardEventKind.BloodGas, at, filed, chart.Bed.Specimen(specimen, at, arterial: false), $"venous sample of {at:HH:mm}");
        foreach (var (code, part, value) in new[]
        {
            (Codes.UnspecifiedPO2, "po2", with.PO2(now.Gas.MixedVenousPO2)),
            (Codes.UnspecifiedPCO2, "pco2", with.PCO2(now.Gas.PaCO2 + 5)),
        })
        {
            chart.File(WardEventKind.BloodGas, at, filed, code, chart.Bed.Result($"{specimen}-{part}", code, at, filed, profile.Units.Tension(value), specimen));
        }
    }
}
