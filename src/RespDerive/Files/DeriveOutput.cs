using System.Text.Json.Nodes;
using RespDerive.Commands;
using RespDerive.Fhir.Writing;
using RespDerive.Physiology;
using RespDerive.Service;
using RespDerive.Timeline;

namespace RespDerive.Files;

/// <summary>Writes a derivation as NDJSON: our Device, then each Observation followed by its Provenance; withheld outcomes apart.</summary>
internal static class DeriveOutput
{
    public static async Task WriteAsync(Stream stream, ResultRenderer renderer, Derived derived, CancellationToken cancel)
    {
        await FhirJson.WriteLineAsync(stream, renderer.Device(), cancel);
        foreach (var (outcome, edition) in derived.Published)
        {
            await FhirJson.WriteLineAsync(stream, renderer.Observation(outcome, edition), cancel);
            await FhirJson.WriteLineAsync(stream, renderer.Provenance(outcome, edition, $"Observation/{outcome.Identity}"), cancel);
        }
    }

    public static async Task WriteWithheldAsync(TextWriter writer, IEnumerable<Outcome> withheld)
    {
        foreach (var outcome in withheld)
        {
            await writer.WriteLineAsync(OutputOption.Line(new JsonObject
            {
                ["patient"] = outcome.Patient,
                ["definition"] = outcome.Definition,
                ["anchor"] = outcome.AnchorReference,
                ["effective"] = outcome.AtText,
                ["code"] = outcome.Withheld,
                ["text"] = Text(outcome),
                ["considered"] = new JsonArray([.. outcome.Considered.Select(Candidate)]),
            }));
        }
    }

    /// <summary>The reason in a sentence, with the names of what is missing.</summary>
    public static string Text(Outcome outcome) => Withheld.Text(outcome.Withheld!) + (outcome.Missing.Count > 0 ? $" Missing: {string.Join(", ", outcome.Missing.Distinct())}." : "");

    /// <summary>Results as a file source would hold them: under our own ids, pointing at the inputs by id and version.</summary>
    public static ResultRenderer Renderer(Site site, ServiceOptions options) => new(site.Catalogue, new RenderOptions
    {
        Site = options.Site,
        SoftwareVersion = Software.Version,
        Base = options.Delivery.Canonical,
        UsePutIds = true,
    });

    private static JsonObject Candidate(Candidate candidate) => new()
    {
        ["input"] = candidate.Input,
        ["reference"] = candidate.Reference,
        ["effective"] = candidate.Effective,
        ["value"] = candidate.Value,
        ["unit"] = candidate.Unit,
        ["reason"] = candidate.Reason,
    };
}
