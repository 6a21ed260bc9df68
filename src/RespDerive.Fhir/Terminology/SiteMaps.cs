using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Fhir;

/// <summary>A fault in a table of the site.</summary>
/// <param name="Line">Line, counted from 1.</param>
/// <param name="Text">What is wrong.</param>
public sealed record MapFault(int Line, string Text);

/// <summary>Rows of a site's table and everything that is wrong with it; with faults, do not use the rows.</summary>
public sealed record SiteRows<T>(IReadOnlyList<T> Rows, IReadOnlyList<MapFault> Faults);

/// <summary>The tables a site writes itself: comma-separated values with a header.</summary>
public static class SiteMaps
{
    private static readonly string[] CodeHeader = ["system", "code", "unit", "key"];
    private static readonly string[] CodeHeaderWithoutUnit = ["system", "code", "key"];
    private static readonly string[] ValueHeader = ["key", "system", "code", "value"];

    /// <summary>Reads <c>system,code,unit,key</c>; the column unit may be left out, or empty for any unit.</summary>
    public static SiteRows<MappedCode> Codes(string csv)
    {
        var table = new SiteTable(csv, CodeHeader, CodeHeaderWithoutUnit);
        var rows = new Dictionary<(string, string, string), MappedCode>();
        foreach (var (line, fields) in table.Rows)
        {
            var row = new MappedCode(fields["system"], fields["code"], fields.GetValueOrDefault("unit", ""), fields["key"]);
            if (row.System.Length == 0 || row.Code.Length == 0 || row.Key.Length == 0)
            {
                table.Fault(line, "system, code and key must not be empty");
            }
            else if (row.Key != Keys.None && Keys.Find(row.Key) is null)
            {
                table.Fault(line, $"unknown key '{row.Key}'");
            }
            else if (!rows.TryAdd((row.System, row.Code, row.Unit), row))
            {
                table.Fault(line, $"the code '{row.Code}' with unit '{row.Unit}' is mapped twice");
            }
        }

        return new([.. rows.Values], table.Faults);
    }

    /// <summary>Reads <c>key,system,code,value</c>: what a mode or another coded value means; system is empty for plain words.</summary>
    public static SiteRows<MappedValue> Values(string csv)
    {
        var table = new SiteTable(csv, ValueHeader);
        var rows = new List<MappedValue>();
        foreach (var (line, fields) in table.Rows)
        {
            var row = new MappedValue(fields["key"], fields["system"], fields["code"], fields["value"]);
            if ((Kinds.Find(row.Key) ?? Events.All.FirstOrDefault(kind => kind.Key == row.Key)) is not { IsCoded: true } kind)
            {
                table.Fault(line, $"'{row.Key}' is not a coded kind");
            }
            else if (row.Code.Length == 0)
            {
                table.Fault(line, "code must not be empty");
            }
            else if (!kind.Codes.Contains(row.Value))
            {
                table.Fault(line, $"'{row.Value}' is none of: {string.Join(", ", kind.Codes)}");
            }
            else
            {
                rows.Add(row);
            }
        }

        return new(rows, table.Faults);
    }
}
