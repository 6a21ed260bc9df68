using System.Collections.Frozen;
using System.Text;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Fhir;

/// <summary>One row of the map of coded values.</summary>
/// <param name="Key">Key of a coded kind, such as <c>ventilator-mode</c>.</param>
/// <param name="System">Code system; empty for plain words.</param>
/// <param name="Code">The code, or the words.</param>
/// <param name="Value">One of the kind's codes.</param>
public sealed record MappedValue(string Key, string System, string Code, string Value);

/// <summary>From ventilation modes and other coded values, as codes or as words, to the codes of our kinds.</summary>
public sealed class CodedMap
{
    private readonly FrozenDictionary<(string, string, string), string> _values;

    /// <summary>Builds a map; the site's rows win.</summary>
    public CodedMap(IEnumerable<MappedValue>? site = null)
    {
        var values = new Dictionary<(string, string, string), string>();
        var shipped = Tables.Rows("coded.tsv").Select(row => new MappedValue(row[0], row[1], row[2], row[3]));
        foreach (var row in shipped.Concat(site ?? []))
        {
            values[(row.Key, row.System, row.System.Length == 0 ? Plain(row.Code) : row.Code)] = row.Value;
        }

        _values = values.ToFrozenDictionary();
    }

    /// <summary>Index of the value's code in the kind; null when nothing maps it and the kind has no <c>unknown</c>.</summary>
    internal int? Find(Kind kind, ConceptFact value)
    {
        var found = value.Codes.Select(code => _values.GetValueOrDefault((kind.Key, code.System, code.Code))).FirstOrDefault(code => code is not null)
            ?? (value.Text is { } text ? _values.GetValueOrDefault((kind.Key, "", Plain(text))) : null)
            ?? "unknown";
        for (var i = 0; i < kind.Codes.Count; i++)
        {
            if (kind.Codes[i] == found)
            {
                return i;
            }
        }

        return null;
    }

    /// <summary>Lower-case words with one space between them, whatever else stood there.</summary>
    private static string Plain(string words)
    {
        var plain = new StringBuilder(words.Length);
        foreach (var c in words)
        {
            if (char.IsLetterOrDigit(c))
            {
                plain.Append(char.ToLowerInvariant(c));
            }
            else if (plain.Length > 0 && plain[^1] != ' ')
            {
                plain.Append(' ');
            }
        }

        return plain.ToString().TrimEnd();
    }
}
