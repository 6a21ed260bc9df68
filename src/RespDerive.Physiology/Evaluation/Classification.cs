using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>
/// A definition whose result is a code: the band of a named criterion in which a posted number lies. The code comes from the rounded number
/// that is or would be posted, never from the unrounded one. A band is of the criterion, not a diagnosis; it runs only where the site names it.
/// </summary>
/// <remarks>
/// <see cref="Computation.Placement"/> holds the result; a host publishes its code as the value, <see cref="Text"/> as the display, the criterion
/// as the method variant, and neither unit nor uncertainty.
/// </remarks>
public abstract class Classification : Definition
{
    /// <inheritdoc/>
    public sealed override bool OnByDefault => false;

    /// <inheritdoc/>
    public sealed override int Decimals => 0;

    /// <inheritdoc/>
    public sealed override (double Least, double Greatest) Usual => (double.NegativeInfinity, double.PositiveInfinity);

    /// <summary>What a code means, in words.</summary>
    public abstract string Text(string code);

    /// <summary>Criteria it knows, for listings.</summary>
    public abstract IReadOnlyList<Criterion> Criteria { get; }

    /// <summary>The criterion that applies to these roots; only asked when the inputs are complete and no gate trips.</summary>
    public abstract Criterion CriterionFor(Roots roots);
}

/// <summary>Cut-points of one criterion over the posted number of a definition.</summary>
/// <param name="Name">Names the source and edition; the variant of the result.</param>
/// <param name="Number">The definition whose posted number is judged.</param>
/// <param name="Codes">Codes in rising order of the number, one more than cut-points.</param>
/// <param name="Cuts">Cut-points, rising.</param>
/// <param name="CutIsBelow">True when a number equal to a cut-point belongs to the band below it.</param>
/// <param name="Of">The unrounded number.</param>
public sealed record Criterion(string Name, Definition Number, IReadOnlyList<string> Codes, IReadOnlyList<decimal> Cuts, bool CutIsBelow, Func<Roots, double> Of)
{
    /// <summary>The band of a posted number.</summary>
    public string Code(decimal posted) => Codes[Cuts.Count(cut => CutIsBelow ? posted > cut : posted >= cut)];

    /// <summary>The probability of each band for a normally distributed number, in the order of the codes; they sum to one.</summary>
    /// <param name="number">Unrounded.</param>
    /// <param name="uncertainty">Standard uncertainty.</param>
    public IReadOnlyList<Band> Bands(double number, double uncertainty)
    {
        var spread = Math.Max(uncertainty, double.Epsilon);
        var below = Edges().Select(edge => Normal.Below((edge - number) / spread)).Append(1).ToArray();
        return [.. Codes.Select((code, i) => new Band(code, below[i] - (i == 0 ? 0 : below[i - 1])))];
    }

    /// <summary>True when a cut-point lies within two standard uncertainties.</summary>
    public bool Straddles(double number, double uncertainty) => Edges().Any(edge => Math.Abs(edge - number) < 2 * uncertainty);

    /// <summary>Unrounded numbers at which the posted one changes band.</summary>
    private IEnumerable<double> Edges()
    {
        var half = 0.5 * Math.Pow(10, -Number.Decimals);
        return Cuts.Select(cut => (double)cut + (CutIsBelow ? half : -half));
    }
}

/// <summary>One band and its probability.</summary>
/// <param name="Code">The code.</param>
/// <param name="Probability">0 to 1.</param>
public readonly record struct Band(string Code, double Probability);

/// <summary>Where a number came to lie.</summary>
/// <param name="Criterion">The criterion that applied.</param>
/// <param name="Code">The band.</param>
/// <param name="Posted">The rounded number it was taken from.</param>
/// <param name="Uncertainty">Standard uncertainty of that number, in its unit.</param>
/// <param name="Bands">Every band of the criterion with its probability.</param>
public sealed record Placement(Criterion Criterion, string Code, decimal Posted, double Uncertainty, IReadOnlyList<Band> Bands);
