using System.Net;
using System.Net.Http.Json;
using System.Text.Json.Nodes;
using Microsoft.Extensions.Configuration;
using Microsoft.Extensions.Options;

namespace RespDerive.Service.Tests;

public sealed class ConfigurationTests
{
    [Fact]
    public void All_errors_are_told_at_once()
    {
        var errors = Errors(
            ("Site", ""), ("Source:Address", "ftp://ehr.example"), ("Intake:Subscribe", "true"), ("Intake:PageSize", "0"),
            ("Intake:Criteria:0", "Observation"), ("Delivery:Parallel", "100"), ("Delivery:Canonical", "https://a.example/"), ("Policy", "/nowhere/policy.json"), ("TimeZone", "Mars/Base"));
        foreach (var key in new[] { "Site", "Source:Address", "Intake:Endpoint", "Intake:PageSize", "Intake:Criteria", "Delivery:Parallel", "Delivery:Canonical", "Policy", "TimeZone" })
        {
            Assert.Single(errors, error => error.StartsWith("RespDerive:" + key, StringComparison.Ordinal));
        }
    }

    [Fact]
    public void Unknown_key_is_an_error_beside_the_others()
    {
        var errors = Errors(("Onn", "true"), ("Source:Address", "https://ehr.example/fhir"), ("Intake:PageSize", "0"));
        Assert.Equal(2, errors.Length);
        Assert.Contains(errors, error => error.Contains("Onn", StringComparison.Ordinal));
        Assert.Contains(errors, error => error.Contains("PageSize", StringComparison.Ordinal));
    }

    [Fact]
    public void Value_of_the_wrong_kind_is_an_error_that_names_its_key()
    {
        var errors = Errors(("Source:Address", "https://ehr.example/fhir"), ("Delivery:Parallel", "many"));
        Assert.Contains("Parallel", Assert.Single(errors), StringComparison.Ordinal);
    }

    [Fact]
    public void Minimal_configuration_holds_and_posts_nothing()
    {
        var options = ServiceHost.Options(Configuration(("Source:Address", "https://ehr.example/fhir")));
        Assert.False(options.Delivery.On);
        Assert.Equal(IntakeOptions.DefaultCriteria, options.Intake.Searches);
    }

    [Fact]
    public async Task Health_tells_alive_started_and_ready()
    {
        await using var bench = await Bench.StartAsync(Bench.Polling);
        await Until.True(async () => (await HealthAsync("ready"))["read"]!.GetValue<bool>(), "the first poll");
        Assert.Equal("live", (await HealthAsync("live"))["status"]!.ToString());
        Assert.Equal("ready", (await HealthAsync("startup"))["status"]!.ToString());

        async Task<JsonObject> HealthAsync(string what) => (await bench.Http.GetFromJsonAsync<JsonObject>($"{bench.Address}/health/{what}", TestContext.Current.CancellationToken))!;
    }

    [Fact]
    public async Task Server_that_is_down_leaves_the_service_ready()
    {
        await using var bench = await Bench.StartAsync(("Source:Address", "http://127.0.0.1:9/fhir"), ("Intake:Subscribe", "false"));
        using var answer = await bench.NotifyAsync(HttpMethod.Put, "/Patient/p", FhirClient.Content(Some.Patient("p")));
        Assert.Equal(HttpStatusCode.OK, answer.StatusCode);
        using var health = await bench.Http.GetAsync($"{bench.Address}/health/ready", TestContext.Current.CancellationToken);
        Assert.Equal(HttpStatusCode.OK, health.StatusCode);
    }

    private static string[] Errors(params (string Key, string Value)[] settings) =>
        [.. Assert.Throws<OptionsValidationException>(() => ServiceHost.Options(Configuration(settings))).Failures];

    private static IConfiguration Configuration(params (string Key, string Value)[] settings) =>
        new ConfigurationBuilder().AddInMemoryCollection(settings.ToDictionary(one => "RespDerive:" + one.Key, one => (string?)one.Value)).Build();
}
