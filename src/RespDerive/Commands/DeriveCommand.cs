using System.CommandLine;
using System.CommandLine.Invocation;
using System.CommandLine.Parsing;
using System.Globalization;
using System.Text.Json.Nodes;
using RespDerive.Fhir;
using RespDerive.Files;
using RespDerive.Physiology;
using RespDerive.Service;
using RespDerive.Timeline;

namespace RespDerive.Commands;

/// <summary><c>derive</c>: results from files, with the engine, identities and policies of the service.</summary>
internal static class DeriveCommand
{
    private const string Help = """
        Files hold one FHIR R4 resource a line (NDJSON), or a Bundle; '-' is standard input.

        Examples:
          respderive derive ward.ndjson --altitude 520 --out results.ndjson --withheld withheld.ndjson
          respderive derive patients.json observations.ndjson --pressure 745 > results.ndjson
          respderive derive stream.ndjson --policy policy.json --history --out editions.ndjson

        Exit codes: 0 done (withheld values included), 2 wrong request, 5 a line could not be read; everything else was.
        """;

    private sealed record Request(string[] Files, string? Out, string? Withheld, bool History, double? Pressure, double? Altitude, ServiceOptions Options, bool Json);

    public static Command Create(Catalogue catalogue)
    {
        var files = new Argument<string[]>("FILES") { Description = "NDJSON or Bundle files, read in this order.", Arity = ArgumentArity.OneOrMore };
        var target = new Option<string?>("--out") { Description = "Where results go; standard output otherwise.", HelpName = "FILE" };
        var withheld = new Option<string?>("--withheld") { Description = "Where withheld values and their reasons go.", HelpName = "FILE" };
        var history = new Option<bool>("--history") { Description = "Replay in the order given and write every edition, revisions and retractions among them." };
        var policy = new Option<string?>("--policy") { Description = "Policy of the site (JSON).", HelpName = "FILE" };
        var pressure = new Option<double?>("--pressure") { Description = "Barometric pressure.", HelpName = "mm[Hg]" };
        var altitude = new Option<double?>("--altitude") { Description = "Altitude, for pressure by the standard atmosphere.", HelpName = "m" };
        var source = new Option<string>("--source") { Description = "Name of the system of record.", DefaultValueFactory = _ => new SourceOptions().Name };
        var address = new Option<Uri?>("--base") { Description = "Service base of the source, named in the evidence.", HelpName = "URL", CustomParser = Address };
        var site = new Option<string>("--site") { Description = "Name of the site.", DefaultValueFactory = _ => new ServiceOptions().Site };
        var codes = new Option<string?>("--code-map") { Description = "Code map of the site (CSV).", HelpName = "FILE" };
        var modes = new Option<string?>("--mode-map") { Description = "Modes of the site (CSV).", HelpName = "FILE" };
        var zone = new Option<string?>("--time-zone") { Description = "Zone of times sent without one, such as Europe/Berlin.", HelpName = "NAME" };
        var output = OutputOption.Create();
        var command = new Command("derive", "Derives results from files of FHIR resources.")
        {
            files, target, withheld, history, policy, pressure, altitude, source, address, site, codes, modes, zone, output,
        };
        command.Validators.Add(result =>
        {
            if (new[] { result.GetValue(policy) is not null, result.GetValue(pressure) is not null, result.GetValue(altitude) is not null }.Count(given => given) > 1)
            {
                result.AddError("Give one of --policy, --pressure and --altitude.");
            }
        });
        Examples.Add(command, Help);
        command.SetAction((parsed, cancel) =>
        {
            var options = new ServiceOptions
            {
                Site = parsed.GetValue(site)!,
                Policy = parsed.GetValue(policy),
                CodeMap = parsed.GetValue(codes),
                ModeMap = parsed.GetValue(modes),
                TimeZone = parsed.GetValue(zone),
                Source = new SourceOptions { Name = parsed.GetValue(source)!, Address = parsed.GetValue(address) },
            };
            var request = new Request(parsed.GetValue(files)!, parsed.GetValue(target), parsed.GetValue(withheld), parsed.GetValue(history),
                parsed.GetValue(pressure), parsed.GetValue(altitude), options, parsed.GetValue(output) == "json");
            return RunAsync(catalogue, request, parsed.InvocationConfiguration, cancel);
        });
        return command;
    }

    private static Uri? Address(ArgumentResult result)
    {
        if (Uri.TryCreate(result.Tokens[0].Value, UriKind.Absolute, out var address) && address.Scheme is "http" or "https")
        {
            return address;
        }

        result.AddError("--base must be an absolute http or https address, such as https://ehr.example/fhir.");
        return null;
    }

    private static async Task<int> RunAsync(Catalogue catalogue, Request request, InvocationConfiguration streams, CancellationToken cancel)
    {
        var errors = Problems(request).ToArray();
        if (errors.Length > 0)
        {
            foreach (var error in errors)
            {
                await streams.Error.WriteLineAsync(error);
            }

            return Exit.Usage;
        }

        Site site;
        try
        {
            site = new Site(request.Options, catalogue, Policies(request));
        }
        catch (SiteException exception)
        {
            await streams.Error.WriteLineAsync(exception.Message);
            return Exit.Usage;
        }

        var reading = new FileReading(site, TimeProvider.System);
        var derived = await DeriveAsync(site, reading, request, cancel);
        await WriteAsync(site, request, derived, cancel);
        foreach (var unreadable in reading.Unreadable)
        {
            await streams.Error.WriteLineAsync(unreadable.ToString());
        }

        var summary = Summary(reading, derived);
        if (request.Json)
        {
            await (request.Out is null ? streams.Error : streams.Output).WriteLineAsync(OutputOption.Line(summary));
        }
        else
        {
            await streams.Error.WriteLineAsync(string.Join(", ", summary.Select(pair => $"{pair.Value} {pair.Key}")));
        }

        return reading.Unreadable.Count > 0 ? Exit.Data : Exit.Ok;
    }

    private static async Task<Derived> DeriveAsync(Site site, FileReading reading, Request request, CancellationToken cancel)
    {
        var recorded = TimeProvider.System.GetUtcNow();
        var progress = new Progress();
        if (request.History)
        {
            var replay = new Replay(site, recorded);
            await foreach (var facts in reading.ReadAsync(request.Files, cancel))
            {
                replay.Take(facts);
                progress.Show(reading.Count);
            }

            progress.End();
            return replay.Finish();
        }

        var set = new InMemoryResourceSet();
        await foreach (var facts in reading.ReadAsync(request.Files, cancel))
        {
            set.Add(facts);
            progress.Show(reading.Count);
        }

        progress.End();
        return Derivation.Once(site, set, recorded);
    }

    private static async Task WriteAsync(Site site, Request request, Derived derived, CancellationToken cancel)
    {
        await using (var results = request.Out is null ? Console.OpenStandardOutput() : File.Create(request.Out))
        await using (var buffered = new BufferedStream(results, 1 << 16))
        {
            await DeriveOutput.WriteAsync(buffered, DeriveOutput.Renderer(site, request.Options), derived, cancel);
        }

        if (request.Withheld is not null)
        {
            await using var writer = new StreamWriter(request.Withheld) { NewLine = "\n" };
            await DeriveOutput.WriteWithheldAsync(writer, derived.Withheld);
        }
    }

    private static IEnumerable<string> Problems(Request request)
    {
        foreach (var file in request.Files.Concat([request.Options.Policy, request.Options.CodeMap, request.Options.ModeMap]).OfType<string>().Where(file => file != "-" && !File.Exists(file)))
        {
            yield return $"There is no file {file}.";
        }

        if (request.Pressure is < 240 or > 800)
        {
            yield return "--pressure must be 240 to 800 mm[Hg].";
        }

        if (request.Altitude is < -430 or > 9000)
        {
            yield return "--altitude must be -430 to 9000 m.";
        }

        if (request.Options.TimeZone is { } zone && !TimeZoneInfo.TryFindSystemTimeZoneById(zone, out _))
        {
            yield return $"--time-zone {zone} is not known here.";
        }
    }

    private static PolicyBook? Policies(Request request) => request.Pressure is null && request.Altitude is null ? null
        : new PolicyBook(Fhir.Writing.PolicyDocument.WithHash(new Policy { PressureMmHg = request.Pressure, AltitudeMetres = request.Altitude }));

    private static JsonObject Summary(FileReading reading, Derived derived) => new()
    {
        ["resources"] = reading.Count,
        ["readings"] = derived.Readings,
        ["results"] = derived.Published.Count(one => one.Edition.Revision == 1),
        ["revisions"] = derived.Published.Count(one => one.Edition.Revision > 1 && !one.Edition.IsRetraction),
        ["retractions"] = derived.Published.Count(one => one.Edition.IsRetraction),
        ["withheld"] = derived.Withheld.Count,
        ["notRead"] = reading.Refused.Values.Sum(),
        ["unreadable"] = reading.Unreadable.Count,
    };

    /// <summary>A line of progress where somebody is looking.</summary>
    private sealed class Progress
    {
        private readonly bool _shown = !Console.IsErrorRedirected;

        public void Show(long count)
        {
            if (_shown && count % 1000 == 0)
            {
                Console.Error.Write(string.Create(CultureInfo.InvariantCulture, $"\r{count:N0} resources read"));
            }
        }

        public void End()
        {
            if (_shown)
            {
                Console.Error.Write("\r" + new string(' ', 40) + "\r");
            }
        }
    }
}
