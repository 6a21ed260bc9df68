namespace RespDerive.Sandbox.Patients;

/// <summary>Seeded draws; the same seed always gives the same ward.</summary>
internal sealed class Dice(int seed)
{
    private readonly Random _random = new(seed);

    /// <summary>Rectangular on [−limit, +limit].</summary>
    public double Within(double limit) => ((2 * _random.NextDouble()) - 1) * limit;

    public double Between(double low, double high) => low + (_random.NextDouble() * (high - low));

    public bool Chance(double probability) => _random.NextDouble() < probability;

    /// <summary>Normal with mean zero (Box and Muller 1958).</summary>
    public double Normal(double deviation) =>
        deviation * Math.Sqrt(-2 * Math.Log(1 - _random.NextDouble())) * Math.Cos(2 * Math.PI * _random.NextDouble());
}
