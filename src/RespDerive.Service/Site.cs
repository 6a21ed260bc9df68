using RespDerive.Fhir;
using RespDerive.Fhir.Writing;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Service;

/// <summary>What one site's configuration amounts to: its maps, rules, policies and evaluator. Built once, the same for files and service.</summary>
public sealed class Site
{
    private readonly string _resultSystem;

    /// <summary>Reads the files the options name.</summary>
    /// <exception cref="SiteException">Errors in the files, all of them.</exception>
    public Site(ServiceOptions options, Catalogue catalogue, PolicyBook? policies = null)
    {
        ArgumentNullException.ThrowIfNull(options);
        Catalogue = catalogue;
        Source = options.Source.Name;
        SourceBase = options.Source.Address?.AbsoluteUri.TrimEnd('/') ?? "";
        _resultSystem = new Vocabulary(options.Delivery.Canonical).Result;
        var (codes, values) = SiteFiles.ReadMaps(options);
        Rules = new ReadingRules(codes, new ReadingOptions
        {
            Default = new SourceReading { Zone = options.TimeZone is { } zone ? TimeZoneInfo.FindSystemTimeZoneById(zone) : null },
            Fio2PercentRepair = options.RepairOxygenPercent,
            Values = values,
            ResultIdentifierSystem = _resultSystem,
        });
        Evaluator = new Evaluator(catalogue, policies ?? SiteFiles.ReadPolicies(options, catalogue), options.Site);
    }

    /// <summary>Definitions.</summary>
    public Catalogue Catalogue { get; }

    /// <summary>Name of the source.</summary>
    public string Source { get; }

    /// <summary>Base URL of the source; empty when it has none.</summary>
    public string SourceBase { get; }

    /// <summary>From facts to readings.</summary>
    public ReadingRules Rules { get; }

    /// <summary>From readings to outcomes.</summary>
    public Evaluator Evaluator { get; }

    /// <summary>True for one of our own results coming back.</summary>
    public bool IsOwn(ResourceFacts facts) => facts.Identifiers.Any(identifier => identifier.System == _resultSystem);

    /// <summary>Any kind by its key: an input, an event, or the result of a definition.</summary>
    public Kind? KindOf(string key) =>
        Kinds.Find(key) ?? Events.All.FirstOrDefault(kind => kind.Key == key) ?? Catalogue.Find(key)?.Result;
}

/// <summary>Errors in the site's files.</summary>
public sealed class SiteException(IReadOnlyList<string> errors) : Exception(string.Join(Environment.NewLine, errors))
{
    /// <summary>One line each.</summary>
    public IReadOnlyList<string> Errors => errors;
}
