using System.CommandLine;
using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace RespDerive.Commands;

/// <summary>The option <c>--output text|json</c>, the same on every command.</summary>
internal static class OutputOption
{
    private static readonly JsonSerializerOptions Compact = new() { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };
    private static readonly JsonSerializerOptions Indented = new(Compact) { WriteIndented = true };

    public static Option<string> Create()
    {
        var option = new Option<string>("--output", "-o") { Description = "Form of the answer.", DefaultValueFactory = _ => "text", HelpName = "text|json" };
        option.AcceptOnlyFromAmong("text", "json");
        return option;
    }

    /// <summary>One line.</summary>
    public static string Line(JsonNode node) => node.ToJsonString(Compact);

    /// <summary>For one answer that a person may read too.</summary>
    public static string Pretty(JsonNode node) => node.ToJsonString(Indented);
}
