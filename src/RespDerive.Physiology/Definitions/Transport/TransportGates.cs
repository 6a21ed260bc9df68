using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Contents, and conditions on them, that the values of oxygen transport share. Each definition adds its own example.</summary>
internal static class TransportGates
{
    private static readonly TimeSpan Near = TimeSpan.FromMinutes(5);

    /// <summary>Content of the anchor's own sample.</summary>
    public static readonly Slot Arterial = new(OxygenContent.Value, new Pairing.SameSample());

    /// <summary>Content of the mixed venous sample nearest to the arterial one.</summary>
    public static readonly Slot Venous = new(OxygenContentVenous.Value, new Pairing.Nearest(Near, Near));

    /// <summary>A sample that is known not to be arterial.</summary>
    public static readonly Gate ArterialSample = new(Withheld.NotArterial, "the sample is not arterial", [Kinds.Sample],
        x => x.Has(Kinds.Sample) && x.Code(Kinds.Sample) != "arterial");

    /// <summary>Central venous blood differs from mixed venous blood by several per cent saturation, in either direction.</summary>
    public static readonly Gate MixedVenous = new(Withheld.NotMixedVenous, "only a central venous saturation is given, none of the pulmonary artery", [],
        x => x.Has(Kinds.ScvO2) && !x.Has(Kinds.SvO2) && !x.Has(OxygenContentVenous.Value));

    /// <summary>Beside a fractional oxyhaemoglobin the other contents need the fraction that cannot bind.</summary>
    public static readonly Gate DyshemoglobinKnown = new(Withheld.Dyshemoglobin, "oxyhaemoglobin is given as a fraction of all haemoglobin, but not carboxy- and methaemoglobin", [],
        x => x.Has(Kinds.FractionalOxyhemoglobin) && !x.Has(OxygenContent.Value) && !(x.Has(Kinds.Carboxyhemoglobin) && x.Has(Kinds.Methemoglobin)));

    /// <summary>Blood gives oxygen to the body, not the reverse.</summary>
    public static readonly Gate VenousBelowArterial = new(Withheld.VenousExceedsArterial, "the venous oxygen content is not below the arterial one", [],
        x => x.Has(Arterial) && x.Has(Venous) && x[Venous] >= x[Arterial]);
}
