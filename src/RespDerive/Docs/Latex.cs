using System.Text.RegularExpressions;

namespace RespDerive.Docs;

/// <summary>Simple algebra as LaTeX: sums, products, quotients, powers, roots and a few functions. Where it ends, the equation stays text.</summary>
internal sealed partial class Latex
{
    private static readonly Dictionary<string, string> Functions = new(StringComparer.Ordinal)
    {
        ["exp"] = @"\exp", ["ln"] = @"\ln", ["log10"] = @"\log_{10}", ["tanh"] = @"\tanh", ["min"] = @"\min", ["max"] = @"\max",
    };

    private readonly string[] _tokens;
    private int _at;

    private Latex(string[] tokens) => _tokens = tokens;

    /// <summary>The equation in LaTeX; null when it is more than simple algebra.</summary>
    public static string? Of(string equation)
    {
        // "a = b (= c)" says that c is the same by identity.
        var plain = Identity().Replace(equation, " = $1");
        var clauses = Clauses().Split(plain);
        if (Clause(clauses[0]) is not { } first)
        {
            return null;
        }

        // What follows is a further equation, or words: "PCO2 in kPa".
        return clauses.Length == 1 ? first : @"\begin{gathered} " + string.Join(@" \\ ", clauses.Skip(1).Select(clause => Clause(clause) ?? Words(clause)).Prepend(first)) + @" \end{gathered}";
    }

    private static string Words(string text) => @"\text{" + Special().Replace(text, @"\$0").Replace(@"\^", @"\^{}", StringComparison.Ordinal) + "}";

    private static string? Clause(string text)
    {
        text = BeforePi().Replace(text, "·");
        var tokens = Token().Matches(text).Select(match => match.Value).ToArray();
        if (tokens.Length == 0 || string.Concat(tokens) != text.Replace(" ", "", StringComparison.Ordinal))
        {
            return null;
        }

        try
        {
            var latex = new Latex(tokens);
            var equation = latex.Sum();
            var isEquation = latex.Next == "=";
            while (latex.Take("="))
            {
                equation += " = " + latex.Sum();
            }

            return isEquation && latex._at == tokens.Length ? equation.Replace("(", @"\left(", StringComparison.Ordinal).Replace(")", @"\right)", StringComparison.Ordinal) : null;
        }
        catch (FormatException)
        {
            return null;
        }
    }

    private string Sum()
    {
        var sum = (Take("−") || Take("-") ? "-" : "") + Product();
        while (Next is "+" or "−" or "-")
        {
            sum += (_tokens[_at++] == "+" ? " + " : " - ") + Product();
        }

        return sum;
    }

    /// <summary>Read from the left, as the text is: a·b/c·d is ((a·b)/c)·d.</summary>
    private string Product()
    {
        var product = Power();
        while (Next is "·" or "*" or "×" or "/")
        {
            product = _tokens[_at++] == "/" ? $@"\frac{{{Bare(product)}}}{{{Bare(Power())}}}" : $@"{product}\cdot {Power()}";
        }

        return product;
    }

    private string Power()
    {
        var power = Atom();
        while (Next is "^" or "²" or "³" or "⁴" or "⁵" or "⁶")
        {
            power += "^{" + (_tokens[_at++] switch { "²" => "2", "³" => "3", "⁴" => "4", "⁵" => "5", "⁶" => "6", _ => (Take("−") || Take("-") ? "-" : "") + Bare(Atom()) }) + "}";
        }

        return power;
    }

    private string Atom()
    {
        var token = Next is not null ? _tokens[_at++] : throw new FormatException();
        if (token == "(")
        {
            var inner = Sum();
            return Take(")") ? $"({inner})" : throw new FormatException();
        }

        if (char.IsDigit(token[0]))
        {
            return Scientific().Replace(token, @"$1\cdot 10^{$2}");
        }

        if (token is "√" or "∛" or "sqrt" && Next == "(")
        {
            return $@"\sqrt{(token == "∛" ? "[3]" : "")}{{{Bare(Atom())}}}";
        }

        if (Functions.TryGetValue(token, out var function) && Take("("))
        {
            var arguments = Sum();
            while (Take(","))
            {
                arguments += ", " + Sum();
            }

            return Take(")") ? $"{function}({arguments})" : throw new FormatException();
        }

        return char.IsLetter(token[0]) && Next != "(" ? Symbol(token) : throw new FormatException();
    }

    private string? Next => _at < _tokens.Length ? _tokens[_at] : null;

    private bool Take(string token)
    {
        var there = Next == token;
        _at += there ? 1 : 0;
        return there;
    }

    /// <summary>Digits of a formula go below the line, as does what follows an underscore: PaO2, Pes_ei.</summary>
    private static string Symbol(string symbol)
    {
        var parts = symbol.Split('_', 2);
        var below = parts.Length == 2 ? $@"_{{\mathrm{{{parts[1]}}}}}" : "";
        return @"\mathrm{" + Digits().Replace(parts[0], "_{$0}") + "}" + below;
    }

    /// <summary>A fraction or a root needs no brackets around the whole of a part.</summary>
    private static string Bare(string part)
    {
        if (part is not ['(', .., ')'])
        {
            return part;
        }

        var depth = 0;
        for (var i = 0; i < part.Length - 1; i++)
        {
            depth += part[i] switch { '(' => 1, ')' => -1, _ => 0 };
            if (depth == 0)
            {
                return part;
            }
        }

        return part[1..^1];
    }

    [GeneratedRegex(@"\d+(\.\d+)?([eE][+-]?\d+)?|\p{L}[\p{L}\d_'′]*|[-+−·*×/^²³⁴⁵⁶√∛()=,]")]
    private static partial Regex Token();

    [GeneratedRegex("; |, (?![^(]*\\))")]
    private static partial Regex Clauses();

    [GeneratedRegex(@"(?<=\d)(?=π)")]
    private static partial Regex BeforePi();

    [GeneratedRegex("[_%#&^]")]
    private static partial Regex Special();

    [GeneratedRegex(@" \(= (.+)\)$")]
    private static partial Regex Identity();

    [GeneratedRegex(@"^([\d.]+)[eE]\+?(-?\d+)$")]
    private static partial Regex Scientific();

    [GeneratedRegex(@"(?<=\p{L})\d+")]
    private static partial Regex Digits();
}
