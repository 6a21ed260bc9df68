using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>Gates about how the ventilator delivers the breath.</summary>
public static class VentilatorGates
{
    /// <summary>Resistance from two pressures needs constant flow: a mode that controls volume and no other waveform.</summary>
    public static readonly Gate FlowConstant = new(Withheld.FlowNotConstant, "the inspiratory flow is not known to be constant", [Kinds.Waveform],
        x => (x.Has(Kinds.Waveform) && x.Code(Kinds.Waveform) != "constant") || (x.Has(Kinds.Mode) && x.Code(Kinds.Mode) != "volume control"),
        ("Ppeak", 28, "cm[H2O]"), ("Pplat", 22, "cm[H2O]"), ("flow", 45, "L/min"), ("waveform", "decelerating"));

    /// <summary>As <see cref="FlowConstant"/>, where the mode has a gate of its own.</summary>
    public static readonly Gate WaveformConstant = new(Withheld.FlowNotConstant, "the inspiratory flow is not constant", [Kinds.Waveform],
        x => x.Has(Kinds.Waveform) && x.Code(Kinds.Waveform) != "constant");

    /// <summary>The formula integrates pressure over volume for volume control.</summary>
    public static readonly Gate VolumeControlled = new(Withheld.WrongMode, "the mode does not control volume", [],
        x => x.Has(Kinds.Mode) && x.Code(Kinds.Mode) != "volume control");

    /// <summary>The formula integrates pressure over volume for pressure control.</summary>
    public static readonly Gate PressureControlled = new(Withheld.WrongMode, "the mode does not control pressure", [],
        x => x.Has(Kinds.Mode) && x.Code(Kinds.Mode) != "pressure control");

    /// <summary>With a mask part of the volume escapes, and how much is not known.</summary>
    public static readonly Gate NotByMask = new(Withheld.Leak, "ventilation by mask: the volume that reaches the lung is not known", [Kinds.Support],
        x => x.Code(Kinds.Support) == "non-invasive ventilation");

    /// <summary>At constant flow the peak contains the plateau; below it the two are not of one breath, or the patient pulls.</summary>
    public static readonly Gate PeakNotBelowPlateau = new(Withheld.Impossible, "peak pressure is below the plateau pressure of the same breath", [],
        x => x.Has(Kinds.Peak) && x.Has(Kinds.Plateau) && x[Kinds.Peak] < x[Kinds.Plateau]);

    /// <summary>A drop between two pressures is one only when one transducer measured both; without a device they are taken to be of one.</summary>
    public static readonly Gate PressuresOfOneDevice = new(Withheld.InputMissing, "there is no peak pressure of the device that measured the plateau", [], OfTwoDevices);

    private static bool OfTwoDevices(Roots x)
    {
        string? first = null;
        foreach (var root in x.Span)
        {
            if ((root.Kind == Kinds.Peak || root.Kind == Kinds.Plateau) && root.Transducer is { } transducer)
            {
                if (first is not null && first != transducer)
                {
                    return true;
                }

                first = transducer;
            }
        }

        return false;
    }
}
