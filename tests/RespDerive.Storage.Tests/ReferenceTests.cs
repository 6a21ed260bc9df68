namespace RespDerive.Storage.Tests;

public sealed class ReferenceTests
{
    [Fact]
    public async Task A_changed_specimen_reopens_the_observations_taken_from_it()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync(
            Some.Arrival("Specimen/s"),
            Some.Arrival("Observation/1", references: "Specimen/s"),
            Some.Arrival("Observation/2"));
        await temporary.SettleAsync();

        await temporary.AppendAsync(Some.Arrival("Specimen/s", version: 2));

        Assert.Equal(["Observation/1", "Specimen/s"], OpenOf(temporary, "Patient/a"));
    }

    [Fact]
    public async Task A_specimen_that_comes_late_reopens_the_observations_that_named_it()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync(Some.Arrival("Observation/1", references: "Specimen/s"));
        await temporary.SettleAsync();

        await temporary.AppendAsync(Some.Arrival("Specimen/s"));

        Assert.Equal(["Observation/1", "Specimen/s"], OpenOf(temporary, "Patient/a"));
    }

    [Fact]
    public async Task A_reference_of_a_superseded_version_no_longer_counts()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync(Some.Arrival("Observation/1", version: 1, references: "Specimen/s"));
        await temporary.AppendAsync(Some.Arrival("Observation/1", version: 2, references: "Specimen/t"));
        await temporary.SettleAsync();

        await temporary.AppendAsync(Some.Arrival("Specimen/s"));
        Assert.Equal(["Specimen/s"], OpenOf(temporary, "Patient/a"));
        await temporary.AppendAsync(Some.Arrival("Specimen/t"));
        Assert.Equal(["Observation/1", "Specimen/s", "Specimen/t"], OpenOf(temporary, "Patient/a"));
    }

    [Fact]
    public async Task A_changed_device_reopens_through_its_metric_the_observations_of_every_patient()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync(
            Some.Arrival("Device/d", patient: null),
            Some.Arrival("DeviceMetric/m", patient: null, references: "Device/d"),
            Some.Arrival("Observation/1", patient: "Patient/a", references: "DeviceMetric/m"),
            Some.Arrival("Observation/2", patient: "Patient/b", references: "DeviceMetric/m"));
        await temporary.SettleAsync();

        var answer = (await temporary.AppendAsync(Some.Arrival("Device/d", version: 2, patient: null)))[0];

        Assert.Equal(2, answer.Patients.Count);
        Assert.Equal(["Observation/1"], OpenOf(temporary, "Patient/a"));
        Assert.Equal(["Observation/2"], OpenOf(temporary, "Patient/b"));
    }

    [Fact]
    public async Task Devices_that_refer_to_each_other_end()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync(
            Some.Arrival("Device/d", patient: null, references: "Device/e"),
            Some.Arrival("Device/e", patient: null, references: "Device/d"));

        Assert.Empty((await temporary.AppendAsync(Some.Arrival("Device/d", version: 2, patient: null, references: "Device/e")))[0].Patients);
    }

    [Fact]
    public async Task A_panel_reopens_its_members_and_those_it_had_before()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync(Some.Arrival("Observation/1"), Some.Arrival("Observation/2"), Some.Arrival("Observation/3"));
        await temporary.AppendAsync(Some.Arrival("DiagnosticReport/r", references: ["Observation/1", "Observation/2"]));
        await temporary.SettleAsync();

        await temporary.AppendAsync(Some.Arrival("DiagnosticReport/r", version: 2, references: ["Observation/2", "Observation/3"]));

        Assert.Equal(["DiagnosticReport/r", "Observation/1", "Observation/2", "Observation/3"], OpenOf(temporary, "Patient/a"));
    }

    [Fact]
    public async Task Panels_of_an_observation_are_the_current_ones_that_are_not_gone()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        var gone = Some.Arrival("DiagnosticReport/gone", references: "Observation/1");
        await temporary.AppendAsync(
            Some.Arrival("Observation/panel", references: "Observation/1"),
            Some.Arrival("DiagnosticReport/r", version: 1, references: "Observation/1"),
            Some.Arrival("DiagnosticReport/r", version: 2, references: "Observation/1"),
            Some.Arrival("DiagnosticReport/left", version: 1, references: "Observation/1"),
            Some.Arrival("DiagnosticReport/left", version: 2),
            Some.Arrival("Procedure/p", references: "Observation/1"),
            gone,
            gone with { Gone = true, Order = Arrival.GoneAfter(gone.Order) });

        using var history = temporary.Store.History(patient);

        Assert.Equal(["DiagnosticReport/r 2", "Observation/panel 1"], history.PanelsOf("ehr", "Observation/1").Select(Some.Text));
        Assert.Empty(history.PanelsOf("lab", "Observation/1"));
    }

    private static IEnumerable<string> OpenOf(TemporaryStore temporary, string patient) =>
        temporary.Store.OpenTurn(temporary.Store.PatientNumber("ehr", patient)!.Value)!.Resources.Select(body => body.Key.Reference).Order(StringComparer.Ordinal);
}
