using Microsoft.Extensions.Logging;
using Microsoft.Extensions.Options;
using RespDerive.Fhir.Server;
using RespDerive.Fhir.Writing;
using RespDerive.Service.Operations;

namespace RespDerive.Service.Delivery;

/// <summary>The server that is written to, and the renderer for it.</summary>
internal sealed class Target
{
    private readonly Site _site;
    private readonly RenderOptions _options;
    private readonly bool _ownIds;
    private readonly TimeSpan _longestBackOff;
    private readonly ILogger _logger;
    private bool _isReady;
    private int _tries;

    public Target(SourceServer source, Site site, IOptions<ServiceOptions> options, TimeProvider time, ILogger<Target> logger)
    {
        _site = site;
        var delivery = options.Value.Delivery;
        _ownIds = delivery.OwnIds;
        _longestBackOff = delivery.LongestBackOff;
        _logger = logger;
        Server = delivery.Address is { } address ? new FhirServer(ResilientHttp.Client(delivery.Authorization), address, time) : source.Server;
        _options = new RenderOptions
        {
            Site = options.Value.Site,
            SoftwareVersion = Software.Version,
            Base = delivery.Canonical,
            Organization = delivery.Organization,
            OmitDevice = delivery.OmitDevice,
            ProcedureCategory = delivery.ProcedureCategory,
            UsePutIds = delivery.OwnIds,
            TargetHoldsInputs = delivery.Address is null || delivery.Address == options.Value.Source.Address,
        };
        Renderer = new ResultRenderer(site.Catalogue, _options);
    }

    public FhirServer Server { get; }

    public ResultRenderer Renderer { get; private set; }

    /// <summary>Null once our Device is there and its id is known, so that results can point at it; else how long to wait.</summary>
    public async Task<TimeSpan?> HindranceAsync(CancellationToken cancel)
    {
        if (_isReady)
        {
            return null;
        }

        var device = Renderer.Device();
        var answer = _ownIds
            ? await Server.UpdateAsync(device, null, cancel)
            : await Server.CreateAsync(device, $"identifier={Uri.EscapeDataString(device.Identifier[0].System!)}%7C{device.Identifier[0].Value}", cancel);
        if (answer is ServerAnswer.Delivered there)
        {
            Renderer = new ResultRenderer(_site.Catalogue, _options with { DeviceId = there.Id });
            _isReady = true;
            return null;
        }

        var (code, text) = Became.Of(answer) is Became.Parked parked ? (parked.Code, parked.Text) : (answer.GetType().Name, "It is tried again.");
        _logger.LogWarning("Results wait, since the server does not take our Device: {Code} {Text}", code, text);
        return (answer as ServerAnswer.Retry)?.After ?? BackOff.After(_tries++, _longestBackOff, "Device");
    }
}
