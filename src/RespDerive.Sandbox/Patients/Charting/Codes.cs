namespace RespDerive.Sandbox.Patients.Charting;

/// <summary>A LOINC code with its name, and a short word for a screen.</summary>
internal sealed record Code(string Loinc, string Name, string Short);

/// <summary>What the ward measures and sets.</summary>
internal static class Codes
{
    public static readonly Code Mode = new("20124-4", "Ventilation mode Ventilator", "mode");
    public static readonly Code SetFiO2 = new("19994-3", "Oxygen/Total gas setting [Volume Fraction] Ventilator", "FiO2 set");
    public static readonly Code SetPeep = new("20077-4", "Positive end expiratory pressure setting Ventilator", "PEEP set");
    public static readonly Code SetTidalVolume = new("20112-9", "Tidal volume setting Ventilator", "VT set");
    public static readonly Code SetRate = new("19834-1", "Breath rate setting Ventilator", "rate set");
    public static readonly Code SetFlow = new("76275-7", "Inspiratory flow setting Ventilator", "flow set");
    public static readonly Code FiO2Fraction = new("71835-3", "Oxygen/Gas total [Pure volume fraction] Inhaled gas", "FiO2");
    public static readonly Code FiO2Percent = new("19996-8", "Oxygen/Inspired gas Respiratory system --on ventilator", "FiO2");
    public static readonly Code Peep = new("76248-4", "PEEP Respiratory system --on ventilator", "PEEP");
    public static readonly Code TotalPeep = new("76247-6", "Total PEEP Respiratory system", "total PEEP");
    public static readonly Code Plateau = new("76259-1", "Pressure.plateau Respiratory system airway --on ventilator", "plateau");
    public static readonly Code Peak = new("60951-1", "Pressure max Respiratory system airway --during inspiration", "peak");
    public static readonly Code Mean = new("76530-5", "Mean pressure Respiratory system airway --on ventilator", "mean pressure");
    public static readonly Code TidalVolume = new("76007-4", "Tidal volume expired Respiratory system airway --on ventilator", "VT expired");
    public static readonly Code Rate = new("19840-8", "Breath rate spontaneous and mechanical --on ventilator", "rate");
    public static readonly Code MinuteVolume = new("76008-2", "Expired minute Volume during Mechanical ventilation", "minute volume");
    public static readonly Code SpO2 = new("59408-5", "Oxygen saturation in Arterial blood by Pulse oximetry", "SpO2");
    public static readonly Code SaO2 = new("2708-6", "Oxygen saturation in Arterial blood", "SaO2");
    public static readonly Code PaO2 = new("2703-7", "Oxygen [Partial pressure] in Arterial blood", "PaO2");
    public static readonly Code PaCO2 = new("2019-8", "Carbon dioxide [Partial pressure] in Arterial blood", "PaCO2");
    public static readonly Code Ph = new("2744-1", "pH of Arterial blood", "pH");
    public static readonly Code UnspecifiedPO2 = new("11556-8", "Oxygen [Partial pressure] in Blood", "PO2 (venous)");
    public static readonly Code UnspecifiedPCO2 = new("11557-6", "Carbon dioxide [Partial pressure] in Blood", "PCO2 (venous)");
    public static readonly Code Height = new("8302-2", "Body height", "height");
}
