using System.Security.Cryptography;
using System.Text;

namespace RespDerive.Timeline;

/// <summary>Name-based UUIDs, version 5 (RFC 9562, section 5.5): the same name always gives the same id.</summary>
public static class NameBasedUuid
{
    /// <summary>Namespace of this service, itself version 5 of the DNS namespace and "respderive".</summary>
    public static readonly Guid Root = Of(new Guid("6ba7b810-9dad-11d1-80b4-00c04fd430c8"), "respderive");

    /// <summary>The namespace of one site.</summary>
    public static Guid Site(string site) => Of(Root, site);

    /// <summary>UUID of a name made of parts; parts are separated so that no two lists of parts give one name.</summary>
    public static Guid Of(Guid space, params ReadOnlySpan<string> parts)
    {
        var name = string.Join('\u001f', parts);
        Span<byte> input = stackalloc byte[16 + Encoding.UTF8.GetMaxByteCount(name.Length)];
        space.TryWriteBytes(input, bigEndian: true, out _);
        var length = 16 + Encoding.UTF8.GetBytes(name, input[16..]);
        Span<byte> hash = stackalloc byte[20];
#pragma warning disable CA5350 // RFC 9562 prescribes SHA-1 for version 5; this is naming, not security
        SHA1.HashData(input[..length], hash);
#pragma warning restore CA5350
        hash[6] = (byte)((hash[6] & 0x0F) | 0x50);
        hash[8] = (byte)((hash[8] & 0x3F) | 0x80);
        return new Guid(hash[..16], bigEndian: true);
    }
}
