namespace RespDerive.Sandbox.Patients.Gas;

/// <summary>What body and lung do with gas; changes slowly with the course of the illness.</summary>
/// <param name="CarbonDioxideProduction">mL/min (STPD).</param>
/// <param name="RespiratoryQuotient">CO2 production over O2 consumption.</param>
/// <param name="CardiacOutput">L/min.</param>
/// <param name="Hemoglobin">g/dL.</param>
/// <param name="Bicarbonate">mmol/L at a PaCO2 of 40 mm[Hg].</param>
/// <param name="Shunt">Part of cardiac output that passes the lung without taking up oxygen.</param>
/// <param name="DeadSpace">Part of the tidal volume that takes no part in gas exchange.</param>
/// <param name="WashIn">Minutes in which alveolar gas follows a change of FiO2 to 63.2 %.</param>
internal sealed record Circulation(
    double CarbonDioxideProduction, double RespiratoryQuotient, double CardiacOutput, double Hemoglobin, double Bicarbonate,
    double Shunt, double DeadSpace, double WashIn);
