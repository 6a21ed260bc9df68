using System.Text.Json.Nodes;
using RespDerive.Physiology;

namespace RespDerive.Commands;

/// <summary>The JSON form of a computation.</summary>
internal static class ComputeJson
{
    public static JsonObject Of(ByHand hand, JsonNode? id)
    {
        var computed = hand.Computation;
        var published = computed.Withheld is null;
        var numeric = published && computed.Placement is null;
        var answer = new JsonObject
        {
            ["id"] = id,
            ["definition"] = hand.Definition.Key,
            ["revision"] = hand.Definition.Revision,
            ["value"] = numeric ? computed.Value : Coded(hand),
            ["published"] = numeric ? Publication.Text(computed.Published, hand.Definition.Decimals) : null,
            ["unit"] = hand.Definition.Result.Unit,
            ["uncertainty"] = numeric ? computed.Uncertainty : null,
            ["inputs"] = Inputs(hand),
            ["unused"] = new JsonArray([.. hand.Unused.Select(name => JsonValue.Create(name))]),
            ["flags"] = new JsonArray([.. computed.Flags.Select(flag => JsonValue.Create(flag))]),
            ["withheld"] = published ? null : new JsonObject { ["code"] = computed.Withheld, ["text"] = Reason(computed) },
        };
        if (computed.Placement is { } placement)
        {
            answer["bands"] = new JsonArray([.. placement.Bands.Select(band => new JsonObject { ["code"] = band.Code, ["probability"] = band.Probability })]);
        }

        return answer;
    }

    /// <summary>A request that could not be computed.</summary>
    public static JsonObject Error(JsonNode? id, string? definition, string error) => new() { ["id"] = id, ["definition"] = definition, ["error"] = error };

    /// <summary>The sentence of the withheld code, and what is missing when something is.</summary>
    public static string Reason(Computation computed) => computed.Missing.Count > 0
        ? $"{Withheld.Text(computed.Withheld!).TrimEnd('.')}: {string.Join(", ", computed.Missing)}."
        : Withheld.Text(computed.Withheld!);

    private static JsonObject? Coded(ByHand hand) => hand.Computation.Placement is { } placement
        ? new JsonObject { ["code"] = placement.Code, ["text"] = ((Classification)hand.Definition).Text(placement.Code) }
        : null;

    private static JsonObject Inputs(ByHand hand)
    {
        var inputs = new JsonObject();
        var published = hand.Computation.Withheld is null;
        foreach (var input in hand.Inputs)
        {
            inputs[input.Kind.Key] = new JsonObject
            {
                ["value"] = input.Code is { } code ? code : input.Value,
                ["unit"] = input.Kind.Unit,
                ["given"] = input.Given,
                ["assumed"] = input.Assumed,
                ["share"] = published ? input.Share : null,
            };
        }

        foreach (var shared in hand.Computation.Shares.Where(share => share.Transducer is not null))
        {
            inputs["zero-offset:" + shared.Transducer] = new JsonObject { ["value"] = null, ["unit"] = null, ["given"] = null, ["assumed"] = false, ["share"] = shared.Fraction };
        }

        return inputs;
    }
}
