using System.Text;

namespace RespDerive.Docs;

/// <summary>A page in the making.</summary>
internal sealed class Markdown(string title)
{
    private readonly StringBuilder _text = new($"# {title}\n");

    public Markdown Heading(string heading)
    {
        _text.Append("\n## ").Append(heading).Append('\n');
        return this;
    }

    public Markdown Paragraph(string text)
    {
        _text.Append('\n').Append(text).Append('\n');
        return this;
    }

    public Markdown Block(string language, string text)
    {
        _text.Append("\n```").Append(language).Append('\n').Append(text.TrimEnd('\n')).Append("\n```\n");
        return this;
    }

    public Markdown List(IEnumerable<string> items)
    {
        _text.Append('\n').AppendJoin("", items.Select(item => $"- {item}\n"));
        return this;
    }

    public Markdown Table(string[] heads, IEnumerable<string[]> rows)
    {
        _text.Append('\n').Append(Row(heads)).Append(Row([.. heads.Select(_ => "---")]));
        foreach (var row in rows)
        {
            _text.Append(Row([.. row.Select(cell => cell.Replace("|", "\\|", StringComparison.Ordinal))]));
        }

        return this;
    }

    /// <summary>The page, made by <c>respderive docs</c>.</summary>
    public override string ToString() => _text + "\nMade from the catalogue by `respderive docs`.\n";

    private static string Row(string[] cells) => $"| {string.Join(" | ", cells)} |\n";
}
