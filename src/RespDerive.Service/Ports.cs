using System.Net;
using System.Net.Sockets;

namespace RespDerive.Service;

/// <summary>Ports for parts of one process.</summary>
public static class Ports
{
    /// <summary>A port of the loopback address that is free now.</summary>
    public static int Free()
    {
        using var listener = new TcpListener(IPAddress.Loopback, 0);
        listener.Start();
        return ((IPEndPoint)listener.LocalEndpoint).Port;
    }
}
