using Microsoft.Extensions.Options;
using RespDerive.Fhir.Server;

namespace RespDerive.Service;

/// <summary>The server that is read.</summary>
internal sealed class SourceServer
{
    private readonly FhirServer? _server;

    public SourceServer(IOptions<ServiceOptions> options, TimeProvider time)
    {
        var source = options.Value.Source;
        if (source.Address is { } address)
        {
            _server = new FhirServer(ResilientHttp.Client(source.Authorization), address, time);
            Base = address.AbsoluteUri.TrimEnd('/');
        }
    }

    public bool IsConfigured => _server is not null;

    public string Base { get; } = "";

    public FhirServer Server => _server ?? throw new InvalidOperationException("No source is configured.");
}
