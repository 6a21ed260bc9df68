using System.Text;

namespace RespDerive.Commands;

/// <summary>Plain text in aligned columns, for terminals, pipes and logs alike.</summary>
internal static class Columns
{
    private const int Width = 100;

    /// <summary>Rows with every column but the last padded; cells may be empty.</summary>
    public static string Of(IReadOnlyList<string[]> rows, string indent = "  ")
    {
        var widths = Enumerable.Range(0, rows.Max(row => row.Length)).Select(i => rows.Max(row => i < row.Length ? row[i].Length : 0)).ToArray();
        return string.Concat(rows.Select(row =>
            (indent + string.Join("   ", row.Select((cell, i) => cell.PadRight(widths[i])))).TrimEnd() + "\n"));
    }

    /// <summary>A heading in a column of its own and its text beside it, wrapped between words.</summary>
    public static string Note(string heading, string text, int column = 12)
    {
        var written = new StringBuilder().Append("  ").Append(heading.PadRight(column));
        var at = 0;
        foreach (var word in text.Split(' '))
        {
            if (at > 0 && at + word.Length > Width - column)
            {
                written.Append('\n').Append(' ', column + 2);
                at = 0;
            }

            written.Append(at > 0 ? " " : "").Append(word);
            at += word.Length + 1;
        }

        return written.Append('\n').ToString();
    }
}
