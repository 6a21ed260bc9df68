using System.Net;
using System.Net.Http.Json;
using System.Text;
using System.Text.Json.Nodes;

namespace RespDerive.Service.Tests;

/// <summary>What a sender is told, and that nothing it sends stops the next.</summary>
public sealed class WebhookTests
{
    private static readonly DateTimeOffset Drawn = TimeProvider.System.GetUtcNow().AddMinutes(-30);

    [Theory]
    [InlineData("{\"resourceType\":\"Observation\",")]
    [InlineData("not json")]
    [InlineData("[1,2]")]
    [InlineData("{\"status\":\"final\"}")]
    public async Task What_is_no_FHIR_is_answered_400_and_the_next_good_one_is_taken(string body)
    {
        await using var bench = await Bench.StartAsync(Bench.Silent);
        using (var answer = await bench.NotifyAsync(HttpMethod.Post, "", new StringContent(body, Encoding.UTF8, "application/fhir+json")))
        {
            await AssertOutcomeAsync(answer, HttpStatusCode.BadRequest);
        }

        await SendRatioAsync(bench);
        Assert.Equal(200, (await bench.ResultAsync("p", "pf-ratio", _ => true)).Value());
    }

    [Fact]
    public async Task Sender_without_the_agreed_header_is_answered_401()
    {
        await using var bench = await Bench.StartAsync(("Intake:NotificationAuthorization", "Bearer agreed"));
        foreach (var wrong in new[] { null, "Bearer other", "Bearer agreed " + "x" })
        {
            using var answer = await bench.NotifyAsync(HttpMethod.Put, "/Patient/p", FhirClient.Content(Some.Patient("p")), wrong);
            await AssertOutcomeAsync(answer, HttpStatusCode.Unauthorized);
        }

        Assert.Equal(0, bench.Store.Counts().Received);
        using (var answer = await bench.NotifyAsync(HttpMethod.Put, "/Patient/p", FhirClient.Content(Some.Patient("p")), "Bearer agreed"))
        {
            await AssertOutcomeAsync(answer, HttpStatusCode.OK);
        }

        // The Subscription asks for the header, so what the server sends is taken.
        await bench.Fhir.PutAsync(Some.Patient("q"));
        await Until.True(() => bench.Store.Counts().Received == 2, "the notification");
    }

    [Fact]
    public async Task Notification_above_the_limit_is_answered_413()
    {
        await using var bench = await Bench.StartAsync([.. Bench.Silent, ("Intake:LargestNotification", "20000")]);
        var large = Some.Patient("p");
        large["text"] = new JsonObject { ["status"] = "generated", ["div"] = new string('x', 30_000) };
        using (var answer = await bench.NotifyAsync(HttpMethod.Put, "/Patient/p", FhirClient.Content(large)))
        {
            await AssertOutcomeAsync(answer, HttpStatusCode.RequestEntityTooLarge);
        }

        await SendRatioAsync(bench);
        await bench.ResultAsync("p", "pf-ratio", _ => true);
    }

    [Fact]
    public async Task Other_methods_are_answered_405()
    {
        await using var bench = await Bench.StartAsync(Bench.Silent);
        using var answer = await bench.NotifyAsync(HttpMethod.Get, "/Observation/gas");
        await AssertOutcomeAsync(answer, HttpStatusCode.MethodNotAllowed);
    }

    [Fact]
    public async Task Observation_with_an_unknown_code_is_taken_and_says_nothing()
    {
        await using var bench = await Bench.StartAsync(Bench.Silent);
        using (var answer = await bench.NotifyAsync(HttpMethod.Put, "/Observation/odd", FhirClient.Content(Some.Observation("odd", "p", "99999-9", 1, "mg", Drawn))))
        {
            await AssertOutcomeAsync(answer, HttpStatusCode.OK);
        }

        await SendRatioAsync(bench);
        await bench.ResultAsync("p", "pf-ratio", _ => true);
        Assert.Equal(4, bench.Store.Counts().Received);
        Assert.Equal(2, bench.Store.Counts().Readings);
    }

    [Fact]
    public async Task Deletion_told_by_the_server_is_looked_up_and_retracts()
    {
        await using var bench = await Bench.StartAsync();
        await bench.Fhir.PutAsync(Some.Patient("p"));
        await bench.Fhir.PutAsync(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)));
        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 80, Drawn));
        await bench.ResultAsync("p", "pf-ratio", one => one.Value() == 200);

        // Told before it is true: the read finds the gas, and nothing changes.
        using (var early = await bench.NotifyAsync(HttpMethod.Delete, "/Observation/gas"))
        {
            await AssertOutcomeAsync(early, HttpStatusCode.OK);
        }

        await bench.IdleAsync();
        Assert.Equal("final", (await bench.ResultAsync("p", "pf-ratio", _ => true)).Status());

        await bench.Fhir.DeleteAsync("Observation/gas");
        using (var told = await bench.NotifyAsync(HttpMethod.Delete, "/Observation/gas"))
        {
            await AssertOutcomeAsync(told, HttpStatusCode.OK);
        }

        await bench.ResultAsync("p", "pf-ratio", one => one.Status() == "entered-in-error");
    }

    [Fact]
    public async Task Bundle_of_a_topic_based_notification_brings_and_names_resources()
    {
        await using var bench = await Bench.StartAsync(Bench.Silent);
        await bench.Fhir.PutAsync(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)));
        var bundle = new JsonObject
        {
            ["resourceType"] = "Bundle",
            ["type"] = "history",
            ["entry"] = new JsonArray(
                new JsonObject
                {
                    ["resource"] = new JsonObject
                    {
                        ["resourceType"] = "Parameters",
                        ["parameter"] = new JsonArray(new JsonObject
                        {
                            ["name"] = "notification-event",
                            ["part"] = new JsonArray(new JsonObject { ["name"] = "focus", ["valueReference"] = new JsonObject { ["reference"] = $"{bench.Fhir.BaseUrl}/Observation/fio2" } }),
                        }),
                    },
                },
                new JsonObject { ["fullUrl"] = $"{bench.Fhir.BaseUrl}/Observation/gas", ["resource"] = Some.Gas("gas", "p", 80, Drawn) }),
        };
        using (var answer = await bench.NotifyAsync(HttpMethod.Post, "", FhirClient.Content(bundle)))
        {
            await AssertOutcomeAsync(answer, HttpStatusCode.OK);
        }

        Assert.Equal(200, (await bench.ResultAsync("p", "pf-ratio", _ => true)).Value());
    }

    private static async Task SendRatioAsync(Bench bench)
    {
        foreach (var resource in new[] { Some.Patient("p"), Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)), Some.Gas("gas", "p", 80, Drawn) })
        {
            using var answer = await bench.NotifyAsync(HttpMethod.Put, $"/{resource["resourceType"]}/{resource["id"]}", FhirClient.Content(resource));
            await AssertOutcomeAsync(answer, HttpStatusCode.OK);
        }
    }

    private static async Task AssertOutcomeAsync(HttpResponseMessage answer, HttpStatusCode status)
    {
        Assert.Equal(status, answer.StatusCode);
        Assert.Equal("application/fhir+json", answer.Content.Headers.ContentType?.MediaType);
        var outcome = await answer.Content.ReadFromJsonAsync<JsonObject>(TestContext.Current.CancellationToken);
        Assert.Equal("OperationOutcome", outcome!["resourceType"]!.ToString());
        Assert.Equal(status == HttpStatusCode.OK ? "information" : "error", outcome["issue"]![0]!["severity"]!.ToString());
    }
}
