using System.Text;
using System.Text.Json;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>One HTTP request, or one entry of a Bundle, without its transport.</summary>
internal sealed record FhirRequest(string Method, string Path, string Query)
{
    public byte[] Body { get; init; } = [];
    public string? IfMatch { get; init; }
    public string? IfNoneMatch { get; init; }
    public string? IfNoneExist { get; init; }
    public string? Prefer { get; init; }
    public string? ContentType { get; init; }

    public string[] Segments { get; } = Path.Split('/', StringSplitOptions.RemoveEmptyEntries);

    public bool Prefers(string what) => Prefer?.Contains(what, StringComparison.OrdinalIgnoreCase) ?? false;
}

/// <summary>The answer to a <see cref="FhirRequest"/>; <c>About</c> is the version read or written.</summary>
internal sealed record FhirAnswer(int Status, byte[] Body)
{
    public StoredVersion? About { get; init; }
    public string? Location { get; init; }
    public string? Allow { get; init; }

    public static FhirAnswer Of(StoredVersion version, int status = 200) => new(status, version.Json ?? []) { About = version };

    public static FhirAnswer Error(Refusal refusal) => Error(refusal.Status, refusal.Issue, refusal.Message);

    public static FhirAnswer Error(int status, string issue, string text) => new(status, Outcome("error", issue, text));

    public static byte[] Outcome(string severity, string issue, string text) => Encoding.UTF8.GetBytes(
        $$"""{"resourceType":"OperationOutcome","issue":[{"severity":"{{severity}}","code":"{{issue}}","diagnostics":"{{JsonEncodedText.Encode(text)}}"}]}""");
}
