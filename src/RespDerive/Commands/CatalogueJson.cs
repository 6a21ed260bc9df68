using System.Text.Json.Nodes;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Commands;

/// <summary>The JSON form of the catalogue.</summary>
internal static class CatalogueJson
{
    /// <summary>What the list says about a definition.</summary>
    public static JsonObject Brief(Definition definition) => new()
    {
        ["definition"] = definition.Key,
        ["revision"] = definition.Revision,
        ["aliases"] = Texts(definition.Aliases),
        ["symbol"] = definition.Result.Symbol,
        ["name"] = definition.Result.Name,
        ["purpose"] = definition.Purpose,
        ["onByDefault"] = definition.OnByDefault,
        ["byHandOnly"] = definition.ByHandOnly,
        ["unit"] = definition.Result.Unit,
        ["codes"] = Array(definition.Codes.Select(code => new JsonObject { ["system"] = code.System, ["code"] = code.Code, ["display"] = code.Display })),
        ["needs"] = Texts(definition.Result.Needs.Select(CatalogueText.Symbol)),
    };

    /// <summary>Everything about one definition.</summary>
    public static JsonObject Full(Definition definition)
    {
        var full = Brief(definition);
        full["summary"] = definition.Summary;
        full["equation"] = definition.Equation;
        full["assumptions"] = definition.Assumptions;
        full["caution"] = definition.Caution;
        full["decimals"] = definition.Decimals;
        full["usual"] = Range(definition.Usual.Least, definition.Usual.Greatest);
        full["possible"] = Range(definition.Result.Least, definition.Result.Greatest);
        full["greatestRelativeUncertainty"] = definition.GreatestRelativeUncertainty;
        full["onByDefault"] = definition.OnByDefault;
        full["byHandOnly"] = definition.ByHandOnly;
        if (definition is Classification bands)
        {
            full["codes"] = Array(definition.Result.Codes.Select(code => new JsonObject { ["code"] = code, ["text"] = bands.Text(code) }));
            full["criteria"] = Array(bands.Criteria.Select(Criterion));
        }

        full["anchors"] = Texts(definition.Calling.Anchors.Select(kind => kind.Key));
        full["inputs"] = Array(CatalogueText.Chain(definition.Result.Needs.Concat(definition.ByIdentity)).Select(Slot));
        full["gates"] = Array(definition.Gates.Select(gate => new JsonObject { ["code"] = gate.Code, ["text"] = gate.Text, ["example"] = Inputs(gate.TrippedBy) }));
        full["flags"] = Texts(definition.FlagRules.Select(rule => rule.Flag));
        full["citations"] = Array(definition.Citations.Select(citation => new JsonObject { ["text"] = citation.Text, ["doi"] = citation.Doi }));
        full["vectors"] = Array(definition.Vectors.Select(vector => new JsonObject
        {
            ["evidence"] = vector.Evidence switch { Evidence.Published => "published", Evidence.Limit => "limit", _ => "regression" },
            ["source"] = vector.Source,
            ["inputs"] = Inputs(vector.Inputs),
            ["expected"] = definition.Result.IsCoded ? definition.Result.Codes[(int)vector.Expected] : vector.Expected,
            ["within"] = vector.Within,
        }));
        return full;
    }

    private static JsonObject Criterion(Criterion criterion) => new()
    {
        ["name"] = criterion.Name,
        ["number"] = criterion.Number.Key,
        ["codes"] = Texts(criterion.Codes),
        ["cuts"] = new JsonArray([.. criterion.Cuts.Select(cut => JsonValue.Create(cut))]),
        ["cutIsBelow"] = criterion.CutIsBelow,
    };

    private static JsonObject Slot(Slot slot) => new()
    {
        ["name"] = slot.Name,
        ["missing"] = slot.Missing,
        ["kinds"] = Array(slot.Kinds.Select(kind => new JsonObject
        {
            ["key"] = kind.Key,
            ["symbol"] = kind.Symbol,
            ["name"] = kind.Name,
            ["unit"] = kind.Unit,
            ["range"] = kind.IsCoded ? null : Range(kind.Least, kind.Greatest),
            ["codes"] = kind.IsCoded ? Texts(kind.Codes) : null,
            ["assumed"] = kind.Assumed,
            ["computed"] = kind.Formula is not null,
        })),
    };

    private static JsonObject Inputs(IEnumerable<Given> given)
    {
        var inputs = new JsonObject();
        foreach (var one in given)
        {
            inputs[one.Name] = one.Code is { } code ? code : new JsonObject { ["value"] = one.Value, ["unit"] = one.Unit };
        }

        return inputs;
    }

    private static JsonArray? Range(double least, double greatest) => double.IsFinite(least) && double.IsFinite(greatest) ? [least, greatest] : null;

    private static JsonArray Texts(IEnumerable<string> texts) => [.. texts.Select(text => JsonValue.Create(text))];

    private static JsonArray Array(IEnumerable<JsonObject> objects) => [.. objects];
}
