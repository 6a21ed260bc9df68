using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>
/// One derived value: formula, inputs, gates, codes, sources. Each lives in one file under Definitions;
/// everything else (command line, FHIR output, reference pages, generated tests) follows from it.
/// </summary>
public abstract class Definition
{
    private Plan? _plan;

    /// <summary>The value as a kind: key, symbol, name, unit, hard limits, needs and formula.</summary>
    public abstract Kind Result { get; }

    /// <summary>Stable key.</summary>
    public string Key => Result.Key;

    /// <summary>Other keys it is known by.</summary>
    public virtual IReadOnlyList<string> Aliases => [];

    /// <summary>Rises whenever the number changes; the old one stays beside it, frozen.</summary>
    public virtual int Revision => 1;

    /// <summary>False for lesser variants and bands: a site must ask for them.</summary>
    public virtual bool OnByDefault => true;

    /// <summary>True for targets, predictions and model rates: computed when asked, never published.</summary>
    public virtual bool ByHandOnly => false;

    /// <summary>Heading under which the catalogue lists it.</summary>
    public abstract string Purpose { get; }

    /// <summary>One sentence: what it is.</summary>
    public abstract string Summary { get; }

    /// <summary>The equation as implemented, symbols as in the inputs.</summary>
    public abstract string Equation { get; }

    /// <summary>The equation in LaTeX, for one that is no simple algebra; null leaves it to be made from <see cref="Equation"/>.</summary>
    public virtual string? EquationInLatex => null;

    /// <summary>Assumptions and range of validity.</summary>
    public abstract string Assumptions { get; }

    /// <summary>The caution that belongs beside the number.</summary>
    public abstract string Caution { get; }

    /// <summary>Decimals published, in the canonical unit.</summary>
    public abstract int Decimals { get; }

    /// <summary>Outside these the value is published with a flag.</summary>
    public abstract (double Least, double Greatest) Usual { get; }

    /// <summary>When it is called for.</summary>
    public abstract Calling Calling { get; }

    /// <summary>Inputs from which it can also be had by identity; only by hand.</summary>
    public virtual IReadOnlyList<Slot> ByIdentity => [];

    /// <summary>Conditions that withhold it.</summary>
    public virtual IReadOnlyList<Gate> Gates => [];

    /// <summary>Conditions that are published with it.</summary>
    public virtual IReadOnlyList<FlagRule> FlagRules => [];

    /// <summary>Pressures of one breath, so of one transducer: where a root says nothing else, they share its zero offset.</summary>
    public virtual IReadOnlyList<Kind> OneTransducer => [];

    /// <summary>Withheld above this relative standard uncertainty; null when the definition does not say so.</summary>
    public virtual double? GreatestRelativeUncertainty => null;

    /// <summary>Standard codes of exactly this quantity; empty when none is verified.</summary>
    public virtual IReadOnlyList<StandardCode> Codes => [];

    /// <summary>Sources.</summary>
    public abstract IReadOnlyList<Citation> Citations { get; }

    /// <summary>Worked examples.</summary>
    public abstract IReadOnlyList<Vector> Vectors { get; }

    /// <summary>Symbols that mean another kind here than in the general vocabulary.</summary>
    public virtual IReadOnlyDictionary<string, Kind> Symbols => System.Collections.Immutable.ImmutableDictionary<string, Kind>.Empty;

    /// <summary>Kinds that only gates and flag rules look at.</summary>
    public IEnumerable<Kind> Watched => Plan.Watched;

    /// <summary>What an evaluation looks up.</summary>
    internal Plan Plan => _plan ??= new Plan(this);
}
