using System.Text.RegularExpressions;

namespace RespDerive.Fhir.Server;

/// <summary>The one server we talk to. Whatever a resource or a page points at is asked for only below this address.</summary>
internal sealed partial class ServerBase
{
    private readonly Uri _root;

    /// <exception cref="ArgumentException">Not an absolute http or https address, or one with user, query or fragment.</exception>
    public ServerBase(Uri address)
    {
        if (!address.IsAbsoluteUri || address.Scheme is not ("http" or "https") || address.UserInfo.Length > 0 || address.Query.Length > 0 || address.Fragment.Length > 0)
        {
            throw new ArgumentException("The base must be an absolute http or https address without user, query or fragment.", nameof(address));
        }

        _root = new Uri(address.AbsoluteUri.TrimEnd('/') + "/");
    }

    /// <summary>The base itself, for transactions.</summary>
    public Uri Whole => new(_root.AbsoluteUri.TrimEnd('/'));

    /// <summary>An address below the base, from a relative path and query that we made ourselves.</summary>
    public Uri At(string relative) => new(_root, relative);

    /// <summary>True for an address of this server.</summary>
    public bool Holds(Uri address) => address.IsAbsoluteUri && address.UserInfo.Length == 0
        && Uri.Compare(address, _root, UriComponents.SchemeAndServer, UriFormat.Unescaped, StringComparison.OrdinalIgnoreCase) == 0
        && (address.AbsolutePath.StartsWith(_root.AbsolutePath, StringComparison.Ordinal) || address.AbsolutePath + "/" == _root.AbsolutePath);

    /// <summary>Address of a reference found in a resource: <c>Type/id</c> with or without version, or an absolute one of this server; null for any other.</summary>
    public Uri? OfReference(string reference)
    {
        var plain = reference.Split('#')[0];
        return Relative().IsMatch(plain) ? At(plain)
            : Uri.TryCreate(plain, UriKind.Absolute, out var absolute) && absolute.Query.Length == 0 && Holds(absolute) && Relative().IsMatch(_root.MakeRelativeUri(absolute).ToString()) ? absolute
            : null;
    }

    /// <summary>Address of a page link, absolute or relative to the base; null for another server's.</summary>
    public Uri? OfLink(string link) => Uri.TryCreate(_root, link, out var address) && Holds(address) ? address : null;

    [GeneratedRegex(@"^[A-Z][A-Za-z]{1,40}/[A-Za-z0-9\-.]{1,64}(/_history/[A-Za-z0-9\-.]{1,64})?$")]
    private static partial Regex Relative();
}
