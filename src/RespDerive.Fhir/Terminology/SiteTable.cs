using System.Text;

namespace RespDerive.Fhir;

/// <summary>Comma-separated values with a header; quotes as in RFC 4180, except that a field stays on its line.</summary>
internal sealed class SiteTable
{
    private readonly List<(int Line, IReadOnlyDictionary<string, string> Fields)> _rows = [];
    private readonly List<MapFault> _faults = [];

    public SiteTable(string csv, params string[][] headers)
    {
        string[]? header = null;
        var number = 0;
        foreach (var line in csv.TrimStart('\uFEFF').Split('\n'))
        {
            number++;
            if (string.IsNullOrWhiteSpace(line) || line[0] == '#')
            {
                continue;
            }

            if (Split(line.TrimEnd('\r')) is not { } fields)
            {
                Fault(number, "a quote is not closed");
            }
            else if (header is null)
            {
                header = Array.Find(headers, known => known.SequenceEqual(fields));
                if (header is null)
                {
                    Fault(number, $"the header must be {string.Join(',', headers[0])}");
                    return;
                }
            }
            else if (fields.Count != header.Length)
            {
                Fault(number, $"{fields.Count} fields where the header has {header.Length}");
            }
            else
            {
                _rows.Add((number, header.Zip(fields).ToDictionary(pair => pair.First, pair => pair.Second, StringComparer.Ordinal)));
            }
        }

        if (header is null)
        {
            Fault(1, $"the header {string.Join(',', headers[0])} is missing");
        }
    }

    public IReadOnlyList<(int Line, IReadOnlyDictionary<string, string> Fields)> Rows => _rows;

    public IReadOnlyList<MapFault> Faults => [.. _faults.OrderBy(fault => fault.Line)];

    public void Fault(int line, string text) => _faults.Add(new(line, text));

    private static List<string>? Split(string line)
    {
        var fields = new List<string>();
        var field = new StringBuilder();
        var quoted = false;
        for (var i = 0; i < line.Length; i++)
        {
            var c = line[i];
            if (c == '"' && quoted && i + 1 < line.Length && line[i + 1] == '"')
            {
                field.Append('"');
                i++;
            }
            else if (c == '"')
            {
                quoted = !quoted;
            }
            else if (c == ',' && !quoted)
            {
                fields.Add(field.ToString().Trim());
                field.Clear();
            }
            else
            {
                field.Append(c);
            }
        }

        fields.Add(field.ToString().Trim());
        return quoted ? null : fields;
    }
}
