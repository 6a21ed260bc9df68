using Hl7.Fhir.Model;
using Hl7.Fhir.Serialization;
using Microsoft.Extensions.Options;
using RespDerive.Fhir.Server;
using RespDerive.Fhir.Writing;

namespace RespDerive.Service.Delivery;

/// <summary>The server that is written to, and the renderer for it.</summary>
internal sealed class Target
{
    private readonly Site _site;
    private readonly RenderOptions _options;
    private readonly bool _ownIds;

    public Target(SourceServer source, Site site, IOptions<ServiceOptions> options, TimeProvider time)
    {
        _site = site;
        var delivery = options.Value.Delivery;
        _ownIds = delivery.OwnIds;
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

    private bool IsReady { get; set; }

    /// <summary>Makes sure our Device is there and its id is known.</summary>
    public async Task<bool> ReadyAsync(CancellationToken cancel)
    {
        if (!IsReady)
        {
            var device = Renderer.Device();
            var answer = _ownIds
                ? await Server.UpdateAsync(device, null, cancel)
                : await Server.CreateAsync(device, $"identifier={Uri.EscapeDataString(device.Identifier[0].System!)}%7C{device.Identifier[0].Value}", cancel);
            if (answer is ServerAnswer.Delivered there)
            {
                Renderer = new ResultRenderer(_site.Catalogue, _options with { DeviceId = there.Id });
                IsReady = true;
            }
        }

        return IsReady;
    }

    /// <summary>Marks a duplicate of a result as entered in error; it is ours, since it carries our identifier.</summary>
    public async System.Threading.Tasks.Task RetireAsync(string id, CancellationToken cancel)
    {
        var answer = await Server.ReadAsync($"Observation/{id}", cancel);
        if (answer.Found && FhirJsonDeserializer.RECOVERABLE.DeserializeResource(System.Text.Encoding.UTF8.GetString(answer.Body)) is Observation duplicate
            && duplicate.Status != ObservationStatus.EnteredInError)
        {
            duplicate.Status = ObservationStatus.EnteredInError;
            await Server.UpdateAsync(duplicate, duplicate.Meta?.VersionId ?? answer.ETag, cancel);
        }
    }
}
