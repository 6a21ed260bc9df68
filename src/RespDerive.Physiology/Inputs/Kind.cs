namespace RespDerive.Physiology.Inputs;

/// <summary>Where a kind of value comes from.</summary>
public enum Origin
{
    /// <summary>Set by a person on a device; in force until changed.</summary>
    Setting,

    /// <summary>Measured at the bedside.</summary>
    Measurement,

    /// <summary>Measured on a sample.</summary>
    Laboratory,

    /// <summary>A property of the patient.</summary>
    Demographic,

    /// <summary>A constant of the site or of the definition.</summary>
    Constant,

    /// <summary>A circumstance that only gates look at.</summary>
    Circumstance,

    /// <summary>The result of a definition.</summary>
    Derived,
}

/// <summary>One sort of value a formula can use: a quantity in its canonical UCUM unit, or a coded value.</summary>
public sealed class Kind
{
    private static int _last = -1;

    private Kind(string key, string symbol, string name, Origin origin)
    {
        (Key, Symbol, Name, Origin) = (key, symbol, name, origin);
    }

    /// <summary>Stable key, lower case with hyphens.</summary>
    public string Key { get; }

    /// <summary>Symbol used in equations.</summary>
    public string Symbol { get; }

    /// <summary>What it is, in words.</summary>
    public string Name { get; }

    /// <summary>Where it comes from.</summary>
    public Origin Origin { get; }

    /// <summary>Place in tables by kind.</summary>
    internal int Number { get; } = Interlocked.Increment(ref _last);

    /// <summary>Canonical UCUM unit; null for a coded kind.</summary>
    public string? Unit { get; private init; }

    /// <summary>Least plausible value, canonical unit.</summary>
    public double Least { get; private init; } = double.NegativeInfinity;

    /// <summary>Greatest plausible value, canonical unit.</summary>
    public double Greatest { get; private init; } = double.PositiveInfinity;

    /// <summary>Withheld code for a value outside the plausible range.</summary>
    public string RangeCode { get; private init; } = Withheld.InputInvalid;

    /// <summary>Default uncertainty of one reading.</summary>
    public Tolerance Tolerance { get; private init; } = Tolerance.None;

    /// <summary>Codes of a coded kind, in order; empty for a quantity.</summary>
    public IReadOnlyList<string> Codes { get; private init; } = [];

    /// <summary>The value assumed when none is given; null when nothing may be assumed.</summary>
    public double? Assumed { get; private init; }

    /// <summary>The definition's formula when this kind is the result of one.</summary>
    public Func<Roots, double>? Formula { get; private init; }

    /// <summary>What the formula needs; empty for a kind that is only read.</summary>
    public IReadOnlyList<Slot> Needs { get; private init; } = [];

    /// <summary>True for a kind whose value is a code.</summary>
    public bool IsCoded => Codes.Count > 0;

    /// <summary>A quantity.</summary>
    public static Kind Quantity(string key, string symbol, string name, Origin origin, string unit, double least, double greatest,
        Tolerance tolerance, string? rangeCode = null, double? assumed = null) => new(key, symbol, name, origin)
        {
            Unit = unit,
            Least = least,
            Greatest = greatest,
            Tolerance = tolerance,
            RangeCode = rangeCode ?? Withheld.InputInvalid,
            Assumed = assumed,
        };

    /// <summary>A coded kind; its value in <see cref="Roots"/> is the index of its code.</summary>
    public static Kind Coded(string key, string symbol, string name, Origin origin, params string[] codes) =>
        new(key, symbol, name, origin) { Codes = codes };

    /// <summary>A coded kind with a single code that is assumed when nothing better is given.</summary>
    public static Kind Taken(string key, string symbol, string name, Origin origin, string code) =>
        new(key, symbol, name, origin) { Codes = [code], Assumed = 0 };

    /// <summary>The result of a definition, usable as an input of others.</summary>
    public static Kind Derived(string key, string symbol, string name, string unit, double least, double greatest, Tolerance given,
        IReadOnlyList<Slot> needs, Func<Roots, double> formula) => new(key, symbol, name, Origin.Derived)
        {
            Unit = unit,
            Least = least,
            Greatest = greatest,
            Tolerance = given,
            RangeCode = Withheld.Impossible,
            Formula = formula,
            Needs = needs,
        };

    /// <summary>The coded result of a definition; the formula gives the index of the code.</summary>
    public static Kind Classified(string key, string symbol, string name, IReadOnlyList<string> codes, IReadOnlyList<Slot> needs, Func<Roots, double> formula) =>
        new(key, symbol, name, Origin.Derived) { Codes = codes, RangeCode = Withheld.Impossible, Formula = formula, Needs = needs };

    /// <summary>True when the formula of this kind has all it needs.</summary>
    internal bool ComputableFrom(Roots roots) => Formula is not null && roots.HasAll(Needs);

    /// <inheritdoc/>
    public override string ToString() => Key;
}
