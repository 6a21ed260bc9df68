using ScottPlot;

namespace RespDerive.Plots;

/// <summary>A line of a picture.</summary>
/// <param name="Label">What it is.</param>
/// <param name="Points">Points, left to right.</param>
/// <param name="Mark">A point to stand out.</param>
internal sealed record Line(string Label, IReadOnlyList<(double X, double Y)> Points, (double X, double Y)? Mark = null);

/// <summary>The picture of one definition, from values that the catalogue computes.</summary>
/// <param name="Definition">Key of the definition it belongs to.</param>
/// <param name="Needs">Keys of the definitions that compute its points.</param>
/// <param name="Across">Words of the horizontal axis.</param>
/// <param name="Up">Words of the vertical axis.</param>
/// <param name="Legend">Where there is room for the legend.</param>
/// <param name="Lines">The lines.</param>
internal sealed record Picture(string Definition, string[] Needs, string Across, string Up, Alignment Legend, Func<IReadOnlyList<Line>> Lines)
{
    /// <summary>Present on common Linux systems; the layout depends on it, so it is named.</summary>
    private const string Font = "DejaVu Sans";
    private const int Width = 640;
    private const int Height = 420;

    /// <summary>The picture as SVG.</summary>
    public string Draw()
    {
        Fonts.Default = Font;
        using var plot = new Plot();
        foreach (var line in Lines())
        {
            var drawn = plot.Add.ScatterLine(line.Points.Select(point => point.X).ToArray(), line.Points.Select(point => point.Y).ToArray());
            drawn.LegendText = line.Label;
            drawn.LineWidth = 2;
            if (line.Mark is { } mark)
            {
                plot.Add.Marker(mark.X, mark.Y, MarkerShape.FilledCircle, 8, drawn.Color);
            }
        }

        plot.XLabel(Across);
        plot.YLabel(Up);
        plot.Axes.Bottom.Label.Bold = plot.Axes.Left.Label.Bold = false;
        plot.ShowLegend(Legend);
        return plot.GetSvgXml(Width, Height).Replace($"\"{Font}\"", $"\"{Font}, sans-serif\"", StringComparison.Ordinal).ReplaceLineEndings("\n").TrimEnd('\n') + "\n";
    }
}
