using System.Text.Json;
using System.Text.RegularExpressions;

namespace RespDerive.Fhir.Server;

/// <summary>What may be repeated of an OperationOutcome issue: its code and its element path. Texts may quote patient data and are dropped.</summary>
internal sealed partial record OutcomeIssue(string Code, string? Place)
{
    /// <summary>The error and fatal issues; empty when the body is no OperationOutcome.</summary>
    public static IReadOnlyList<OutcomeIssue> Read(ReadOnlyMemory<byte> body)
    {
        try
        {
            using var json = JsonDocument.Parse(body);
            return Read(json.RootElement);
        }
        catch (JsonException)
        {
            return [];
        }
    }

    public static IReadOnlyList<OutcomeIssue> Read(JsonElement outcome) => outcome.Text("resourceType") == "OperationOutcome"
        ? [.. outcome.Items("issue").Where(issue => issue.Text("severity") is "error" or "fatal").Select(Of)]
        : [];

    private static OutcomeIssue Of(JsonElement issue)
    {
        var code = issue.Text("code");
        var path = issue.Items("expression").Concat(issue.Items("location")).Where(item => item.ValueKind == JsonValueKind.String).Select(item => item.GetString()!).FirstOrDefault(Path().IsMatch);
        return new OutcomeIssue(code is not null && Word().IsMatch(code) ? code : "unspecified", path);
    }

    [GeneratedRegex("^[a-z][a-z-]{1,30}$")]
    private static partial Regex Word();

    /// <summary>Element names and indexes only; a longer expression could hold a value.</summary>
    [GeneratedRegex(@"^[A-Z][A-Za-z]{1,40}(\.[a-z][A-Za-z]{0,40}(\[(\d{1,3}|x)\])?){0,8}$")]
    private static partial Regex Path();
}
