namespace RespDerive.Sandbox.Search;

/// <summary>Separators in search values and their escapes (R4 search, "Escaping Search Parameters": \, \| \$ \\).</summary>
internal static class SearchText
{
    public static List<string> Split(string text, char separator)
    {
        var parts = new List<string>();
        var start = 0;
        for (var i = 0; i < text.Length; i++)
        {
            if (text[i] == '\\')
            {
                i++;
            }
            else if (text[i] == separator)
            {
                parts.Add(text[start..i]);
                start = i + 1;
            }
        }
        parts.Add(text[start..]);
        return parts;
    }

    public static string Unescape(string text)
    {
        if (!text.Contains('\\', StringComparison.Ordinal))
        {
            return text;
        }
        var plain = new System.Text.StringBuilder(text.Length);
        for (var i = 0; i < text.Length; i++)
        {
            if (text[i] == '\\' && i + 1 < text.Length)
            {
                i++;
            }
            plain.Append(text[i]);
        }
        return plain.ToString();
    }
}
