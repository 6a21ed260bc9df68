using System.Text.Json;
using System.Text.Json.Nodes;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>
/// Replaces links inside a resource by what they turned out to be (R4 "Transaction Processing Rules": all matching
/// links, in references and in elements of type uri). An Identifier's value is a string, not a link, and stays.
/// </summary>
internal static class References
{
    public static void Rewrite(JsonNode? node, Func<string, bool, string?> replacement)
    {
        switch (node)
        {
            case JsonArray list:
                for (var i = 0; i < list.Count; i++)
                {
                    if (Replaced(list[i], isReference: false, replacement) is { } item)
                    {
                        list[i] = item;
                    }
                    else
                    {
                        Rewrite(list[i], replacement);
                    }
                }
                break;
            case JsonObject o:
                foreach (var (name, value) in o.ToArray())
                {
                    if (name == "value" && value is JsonValue)
                    {
                        continue;
                    }
                    if (Replaced(value, name == "reference", replacement) is { } item)
                    {
                        o[name] = item;
                    }
                    else
                    {
                        Rewrite(value, replacement);
                    }
                }
                break;
        }
    }

    private static JsonValue? Replaced(JsonNode? node, bool isReference, Func<string, bool, string?> replacement) =>
        node is JsonValue value && value.GetValueKind() == JsonValueKind.String && replacement(value.GetValue<string>(), isReference) is { } text
            ? JsonValue.Create(text)
            : null;
}
