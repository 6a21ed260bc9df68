using static RespDerive.Physiology.Inputs.Origin;

namespace RespDerive.Physiology.Inputs;

/// <summary>The closed list of kinds that are read or given; results of definitions are kinds too, declared in their own files.</summary>
public static class Kinds
{
#pragma warning disable CS1591 // each line says what it is
    private const string GasAnalyser = "analyser and pre-analytic error, own judgement; worst case CLIA 2025 ±15 % (from memory)";
    private const string Ventilator = "ISO 80601-2-12 (from memory)";
    private const string OxygenMonitor = "ISO 80601-2-55 (from memory)";
    private const string Judgement = "own judgement";
    private static readonly Tolerance Pressure = Tolerance.Limit(2, 0.04, Ventilator, zero: true);
    private static readonly Tolerance Volume = Tolerance.Limit(4, 0.15, Ventilator);
    private static readonly Tolerance CoOximeter = Tolerance.Limit(1.5, 0, "CO-oximeter ±1 to 2 % (from memory)");
    private static readonly Tolerance Rate = Tolerance.Limit(1, 0, Judgement + ": displayed integer");

    private static readonly Tolerance ExpiredCarbonDioxide = Tolerance.Limit(3.1, 0.08, "ISO 80601-2-55 ±(0.43 vol% + 8 %), from memory");

    // blood gas
    public static readonly Kind PaO2 = Kind.Quantity("pao2", "PaO2", "arterial oxygen partial pressure", Laboratory, "mm[Hg]", 10, 750, Tolerance.Deviation(0, 0.05, GasAnalyser));
    public static readonly Kind Po2 = Kind.Quantity("po2-unspecified", "PO2", "oxygen partial pressure, site of sample unspecified", Laboratory, "mm[Hg]", 0.5, 750, Tolerance.Deviation(0, 0.05, GasAnalyser));
    public static readonly Kind PaCO2 = Kind.Quantity("paco2", "PaCO2", "arterial carbon dioxide partial pressure", Laboratory, "mm[Hg]", 5, 200, Tolerance.Deviation(1, 0.025, "analyser quality control, from memory; worst case ±5 mm[Hg]"));
    public static readonly Kind Pco2 = Kind.Quantity("pco2-unspecified", "PCO2", "carbon dioxide partial pressure, site of sample unspecified", Laboratory, "mm[Hg]", 5, 200, Tolerance.Deviation(1, 0.025, "analyser quality control, from memory"));

    public static readonly Kind PhArterial = Kind.Quantity("ph-arterial", "pH", "arterial pH", Laboratory, "[pH]", 6.6, 8, Tolerance.Deviation(0.01, 0, "analyser quality control, from memory; worst case ±0.04"));
    public static readonly Kind SaO2 = Kind.Quantity("sao2", "SaO2", "arterial oxygen saturation", Laboratory, "%", 20, 100, CoOximeter);
    public static readonly Kind FractionalOxyhemoglobin = Kind.Quantity("fo2hb", "FO2Hb", "oxyhaemoglobin, fraction of all haemoglobin", Laboratory, "%", 10, 100, CoOximeter);
    public static readonly Kind So2 = Kind.Quantity("so2-unspecified", "SO2", "oxygen saturation, site of sample unspecified", Laboratory, "%", 5, 100, CoOximeter);
    public static readonly Kind SvO2 = Kind.Quantity("svo2", "SvO2", "mixed venous oxygen saturation", Laboratory, "%", 10, 100, CoOximeter);
    public static readonly Kind ScvO2 = Kind.Quantity("scvo2", "ScvO2", "central venous oxygen saturation", Laboratory, "%", 10, 100, CoOximeter);
    public static readonly Kind PvO2 = Kind.Quantity("po2-mixed-venous", "PvO2", "mixed venous oxygen partial pressure", Laboratory, "mm[Hg]", 5, 200, Tolerance.Deviation(0, 0.05, GasAnalyser));
    public static readonly Kind Hemoglobin = Kind.Quantity("hemoglobin", "Hb", "haemoglobin concentration", Laboratory, "g/dL", 2, 25, Tolerance.Limit(0, 0.04, "CLIA 2025 ±4 % (from memory)"));
    public static readonly Kind Carboxyhemoglobin = Kind.Quantity("carboxyhemoglobin", "COHb", "carboxyhaemoglobin, fraction of all haemoglobin", Laboratory, "%", 0, 60, Tolerance.Limit(1, 0, Judgement));
    public static readonly Kind Methemoglobin = Kind.Quantity("methemoglobin", "MetHb", "methaemoglobin, fraction of all haemoglobin", Laboratory, "%", 0, 60, Tolerance.Limit(1, 0, Judgement));

    // constants of blood: part of the definition that uses them, named in its result
    public static readonly Kind Huefner = Kind.Quantity("huefner", "huefner", "Hüfner number: oxygen bound by a gram of haemoglobin", Constant, "mL/g", 1.3, 1.4, Tolerance.None, assumed: 1.34);
    public static readonly Kind OxygenSolubility = Kind.Quantity("oxygen-solubility", "alpha", "solubility of oxygen in blood", Constant, "mL/dL/mm[Hg]", 0.0025, 0.0035, Tolerance.None, assumed: 0.003);
    public static readonly Kind NoDyshemoglobin = Kind.Quantity("dyshemoglobin", "dysHb", "carboxy- and methaemoglobin together, when not measured", Constant, "%", 0, 60, Tolerance.Limit(2, 0, "usual sum in a non-smoker, own judgement"), assumed: 0);
    public static readonly Kind VenousTensionGuess = Kind.Quantity("po2-mixed-venous-guess", "PvO2guess", "mixed venous oxygen partial pressure, when not measured", Constant, "mm[Hg]", 20, 60, Tolerance.Limit(15, 0, Judgement + ": 40 ± 15 mm[Hg], which is ± 0.05 mL/dL"), assumed: 40);
    public static readonly Kind ArteriovenousGuess = Kind.Quantity("arteriovenous-oxygen-difference-guess", "assumed_avDO2", "arteriovenous oxygen content difference, assumed", Constant, "mL/dL", 1, 8, Tolerance.Limit(1, 0, Judgement + ": 3.5 in stable critical illness, 5 in health"), assumed: 3.5);
    public static readonly Kind EndCapillarySaturation = Kind.Quantity("so2-end-capillary", "ScO2", "end-capillary oxygen saturation", Constant, "%", 50, 100, Tolerance.Deviation(0.5, 0, Judgement));
    public static readonly Kind StandardPh = Kind.Quantity("standard-ph", "pHstd", "standard pH of the dissociation curve", Constant, "[pH]", 7.4, 7.4, Tolerance.None, assumed: 7.4);
    public static readonly Kind StandardPco2 = Kind.Quantity("standard-pco2", "PCO2std", "standard carbon dioxide partial pressure of the dissociation curve", Constant, "mm[Hg]", 40, 40, Tolerance.None, assumed: 40);
    public static readonly Kind GasTemperature = Kind.Quantity("gas-temperature", "Tgas", "temperature at which the gas tensions were measured", Constant, "Cel", 15, 42, Tolerance.None, assumed: 37);
    public static readonly Kind Diphosphoglycerate = Kind.Quantity("dpg", "DPG", "2,3-diphosphoglycerate in blood", Constant, "mmol/L", 0.5, 12, Tolerance.Limit(1, 0, Judgement), assumed: 4.65);
    public static readonly Kind KelmanP50 = Kind.Quantity("kelman-p50", "P50blood", "half-saturation tension of the blood on the Kelman curve", Constant, "mm[Hg]", 10, 60, Tolerance.Deviation(0.5, 0, Judgement), assumed: 26.8);
    public static readonly Kind StandardP50 = Kind.Quantity("standard-p50", "P50std", "half-saturation tension of the standard curve", Constant, "mm[Hg]", 24, 30, Tolerance.None, assumed: SeveringhausCurve.P50);
    public static readonly Kind SeveringhausMisfit = Misfit("severinghaus-misfit", "dSsev", "Severinghaus", 0.55, "greatest error stated by Severinghaus 1979");
    public static readonly Kind KelmanMisfit = Misfit("kelman-misfit", "dSkel", "Kelman", 0.3, "greatest distance from table 1 of Severinghaus 1979 above 50 mm[Hg]; below, up to 2.2 %");
    public static readonly Kind DashMisfit = Misfit("dash-misfit", "dSdash", "Dash", 0.61, "greatest distance from table 1 of Severinghaus 1979");
    public static readonly Kind SiggaardAndersenMisfit = Misfit("siggaard-andersen-misfit", "dSsa", "Siggaard-Andersen", 0.42, "greatest distance from table 1 of Severinghaus 1979");
    public static readonly Kind DissociationCurve = Kind.Coded("dissociation-curve", "model", "dissociation curve", Constant, "severinghaus");

    // oxygen
    public static readonly Kind FiO2Measured = Kind.Quantity("fio2-measured", "FiO2meas", "inspired oxygen fraction, measured", Measurement, "1", 0.205, 1, Tolerance.Limit(0.025, 0.025, OxygenMonitor), Withheld.Fio2UnitImplausible);
    public static readonly Kind FiO2Set = Kind.Quantity("fio2-set", "FiO2set", "inspired oxygen fraction, set", Setting, "1", 0.205, 1, Tolerance.Limit(0.03, 0, "blender ±3 vol%, own judgement"), Withheld.Fio2UnitImplausible);
    public static readonly Kind FiO2 = Kind.Quantity("fio2", "FiO2", "inspired oxygen fraction", Measurement, "1", 0.205, 1, Tolerance.Limit(0.03, 0, "blender ±3 vol%, own judgement"), Withheld.Fio2UnitImplausible);
    public static readonly Kind OxygenFlow = Kind.Quantity("oxygen-flow", "O2flow", "supplemental oxygen flow", Measurement, "L/min", 0, 100, Tolerance.Limit(0, 0.1, Judgement));
    public static readonly Kind SpO2 = Kind.Quantity("spo2", "SpO2", "oxygen saturation by pulse oximetry", Measurement, "%", 40, 100, Tolerance.Deviation(3, 0, "pulse oximetry accuracy 2 to 4 % root mean square, ISO 80601-2-61"));

    // airway pressures
    public static readonly Kind Plateau = Kind.Quantity("plateau-pressure", "Pplat", "plateau pressure", Measurement, "cm[H2O]", 3, 100, Pressure);
    public static readonly Kind Peak = Kind.Quantity("peak-inspiratory-pressure", "Ppeak", "peak inspiratory pressure", Measurement, "cm[H2O]", 3, 120, Pressure);
    public static readonly Kind MeanAirway = Kind.Quantity("mean-airway-pressure", "Pmean", "mean airway pressure", Measurement, "cm[H2O]", 0.5, 60, Pressure);
    public static readonly Kind PeepTotal = Kind.Quantity("peep-total", "PEEPtot", "total PEEP", Measurement, "cm[H2O]", 0, 50, Pressure);
    public static readonly Kind Peep = Kind.Quantity("peep", "PEEP", "PEEP, measured or unspecified", Measurement, "cm[H2O]", 0, 50, Pressure);
    public static readonly Kind PeepSet = Kind.Quantity("peep-set", "PEEPset", "PEEP, set", Setting, "cm[H2O]", 0, 50, Pressure);
    public static readonly Kind PeepIntrinsic = Kind.Quantity("peep-intrinsic", "PEEPi", "intrinsic PEEP above set PEEP", Measurement, "cm[H2O]", 0, 40, Pressure);
    public static readonly Kind PressureSupportSet = Kind.Quantity("pressure-support-set", "PSset", "pressure support, set", Setting, "cm[H2O]", 0, 60, Pressure);
    public static readonly Kind EsophagealEndInspiratory = Kind.Quantity("esophageal-pressure-end-inspiratory", "Pes_ei", "esophageal pressure at end-inspiration", Measurement, "cm[H2O]", -30, 80, Tolerance.Deviation(3, 0, Judgement + ": ±2 cm[H2O] plus position and filling of the balloon"));
    public static readonly Kind EsophagealEndExpiratory = Kind.Quantity("esophageal-pressure-end-expiratory", "Pes_ee", "esophageal pressure at end-expiration", Measurement, "cm[H2O]", -30, 60, Tolerance.Deviation(3, 0, Judgement + ": ±2 cm[H2O] plus position and filling of the balloon"));

    public static readonly Kind Esophageal = Kind.Quantity("esophageal-pressure", "Pes", "esophageal pressure, phase unspecified", Measurement, "cm[H2O]", -30, 80, Tolerance.Deviation(3, 0, Judgement + ": ±2 cm[H2O] plus position and filling of the balloon"));
    public static readonly Kind InspiratoryPressureAbovePeep = Kind.Quantity("inspiratory-pressure-set-above-peep", "dPinsp", "inspiratory pressure above PEEP, set", Setting, "cm[H2O]", 1, 80, Pressure);

    // volumes, rates, flows
    public static readonly Kind TidalVolumeExpired = Kind.Quantity("tidal-volume-expired", "VT", "expired tidal volume", Measurement, "mL", 10, 3000, Volume);
    public static readonly Kind TidalVolume = Kind.Quantity("tidal-volume", "VTdel", "delivered tidal volume", Measurement, "mL", 10, 3000, Volume);
    public static readonly Kind TidalVolumeSet = Kind.Quantity("tidal-volume-set", "VTset", "tidal volume, set", Setting, "mL", 10, 3000, Volume);
    public static readonly Kind TidalVolumeSpontaneous = Kind.Quantity("tidal-volume-spontaneous", "VTspont", "tidal volume of spontaneous breaths", Measurement, "mL", 10, 3000, Volume);
    public static readonly Kind MinuteVolumeExpired = Kind.Quantity("minute-volume-expired", "VE", "expired minute volume", Measurement, "L/min", 0.3, 60, Tolerance.Limit(0, 0.15, Ventilator));
    public static readonly Kind RateTotal = Kind.Quantity("respiratory-rate-total", "RR", "total breath rate on the ventilator", Measurement, "/min", 2, 120, Rate);
    public static readonly Kind RateSpontaneous = Kind.Quantity("respiratory-rate-spontaneous", "RRspont", "spontaneous breath rate", Measurement, "/min", 0, 120, Rate);
    public static readonly Kind RateSet = Kind.Quantity("respiratory-rate-set", "RRset", "breath rate, set", Setting, "/min", 0, 120, Rate);
    public static readonly Kind RespiratoryRate = Kind.Quantity("respiratory-rate", "RRvital", "respiratory rate", Measurement, "/min", 2, 120, Rate);
    public static readonly Kind FlowSet = Kind.Quantity("inspiratory-flow-set", "flow", "inspiratory flow, set", Setting, "L/min", 1, 200, Tolerance.Limit(0, 0.1, Judgement));

    public static readonly Kind CardiacOutput = Kind.Quantity("cardiac-output", "CO", "cardiac output", Measurement, "L/min", 0.5, 30, Tolerance.Deviation(0, 0.07, "thermodilution in triplicate ±10 to 15 % (from memory)"));
    public static readonly Kind InspiratoryTime = Kind.Quantity("inspiratory-time", "Ti", "inspiratory time", Measurement, "s", 0.1, 10, Tolerance.Limit(0, 0.1, Judgement));
    public static readonly Kind IeRatio = Kind.Quantity("ie-ratio", "IE", "inspiratory over expiratory time", Measurement, "1", 0.1, 4, Tolerance.Limit(0, 0.1, Judgement));
    public static readonly Kind IeRatioSet = Kind.Quantity("ie-ratio-set", "IEset", "inspiratory over expiratory time, set", Setting, "1", 0.1, 4, Tolerance.Limit(0, 0.1, Judgement));
    public static readonly Kind RiseTime = Kind.Quantity("pressure-rise-time-set", "Tslope", "time over which the inspiratory pressure rises, set", Setting, "s", 0, 2, Tolerance.Limit(0, 0.1, Judgement));

    // model, targets
    public static readonly Kind DeadSpaceVolume = Kind.Quantity("dead-space-volume", "VD", "dead space of a breath", Measurement, "mL", 5, 1500, Tolerance.Limit(0, 0.15, Judgement));
    public static readonly Kind AlveolarVentilationToKeep = Kind.Quantity("alveolar-ventilation-to-keep", "VAkeep", "alveolar ventilation that is to be kept", Constant, "L/min", 0.5, 40, Tolerance.None);
    public static readonly Kind TidalVolumeTarget = Kind.Quantity("tidal-volume-target", "VTtarget", "wanted tidal volume per predicted body weight", Constant, "mL/kg", 2, 15, Tolerance.None);
    public static readonly Kind PrintedWorkFactor = Kind.Quantity("work-factor", "k", "work of 1 L·cm[H2O], as printed with the formulas of mechanical power", Constant, "J/(L.cm[H2O])", 0.0979, 0.0982, Tolerance.None, assumed: 0.098);
    public static readonly Kind ModeTaken = Kind.Taken("ventilator-mode-taken", "mode_taken", "ventilation mode, taken on trust", Constant, "the one the formula is made for");

    // patient, site
    public static readonly Kind Height = Kind.Quantity("height", "height", "body height", Demographic, "cm", 140, 210, Tolerance.Limit(1, 0, "measured height, own judgement"), Withheld.HeightOutOfRange);
    public static readonly Kind Sex = Kind.Coded("sex", "sex", "sex used by the formula", Demographic, "female", "male", "unknown");
    public static readonly Kind Weight = Kind.Quantity("weight", "weight", "body weight", Demographic, "kg", 20, 400, Tolerance.Limit(2, 0, Judgement));
    public static readonly Kind Age = Kind.Quantity("age", "age", "age", Demographic, "a", 0, 125, Tolerance.None);
    public static readonly Kind BarometricPressure = Kind.Quantity("barometric-pressure", "PB", "barometric pressure", Constant, "mm[Hg]", 240, 800, Tolerance.Limit(0.75, 0, "barometer ±1 hPa, own judgement"));
    public static readonly Kind WaterVapour = Kind.Quantity("water-vapour-pressure", "PH2O", "water vapour pressure in the airways", Constant, "mm[Hg]", 40, 55, Tolerance.None, assumed: 47);
    public static readonly Kind RespiratoryQuotient = Kind.Quantity("respiratory-quotient", "R", "respiratory exchange ratio", Constant, "1", 0.6, 1.2, Tolerance.Limit(0.1, 0, "assumed 0.8 ± 0.1, own judgement"), assumed: 0.8);

    public static readonly Kind PopulationSpread = Kind.Quantity("population-spread", "spread", "distance of one healthy person from the prediction", Constant, "mm[Hg]", -25, 25, Tolerance.Deviation(7, 0, "spread of the reference population (from memory)"), assumed: 0);
    public static readonly Kind ExpectedGradientRule = Kind.Coded("expected-gradient-rule", "rule", "rule of prediction", Constant, "age/4+4", "(age+10)/4", "2.5+0.21*age");
    public static readonly Kind NoAltitudeCorrection = Kind.Quantity("altitude-correction-none", "kalt", "altitude correction, when the barometric pressure is not known", Constant, "1", 1, 1, Tolerance.None, assumed: 1);
    public static readonly Kind OxygenationCriteria = Kind.Coded("oxygenation-criteria", "criteria", "set of criteria", Constant, "berlin-2012", "global-2023", "global-2023-limited-resources");
    public static readonly Kind SupportNotStated = Kind.Taken("respiratory-support-not-stated", "support_not_stated", "respiratory support, not stated", Constant, "not stated");
    public static readonly Kind HighFlowTaken = Kind.Taken("respiratory-support-taken", "support_taken", "respiratory support, taken on trust", Constant, "high-flow oxygen");
    // carbon dioxide
    public static readonly Kind MixedExpiredCO2 = Kind.Quantity("mixed-expired-co2", "PECO2", "mixed expired carbon dioxide partial pressure", Measurement, "mm[Hg]", 2, 100, ExpiredCarbonDioxide);
    public static readonly Kind EndTidalCO2 = Kind.Quantity("etco2", "PetCO2", "end-tidal carbon dioxide partial pressure", Measurement, "mm[Hg]", 2, 150, ExpiredCarbonDioxide);
    public static readonly Kind MeanAlveolarCO2 = Kind.Quantity("mean-alveolar-pco2", "PACO2_mean", "mean alveolar carbon dioxide partial pressure of volumetric capnography", Measurement, "mm[Hg]", 5, 150, ExpiredCarbonDioxide);
    public static readonly Kind CO2Production = Kind.Quantity("vco2", "VCO2", "carbon dioxide production (STPD)", Measurement, "mL/min", 20, 1500, Tolerance.Limit(0, 0.1, Judgement));
    public static readonly Kind PaCO2Target = Kind.Quantity("paco2-target", "PaCO2target", "arterial carbon dioxide partial pressure aimed at", Constant, "mm[Hg]", 20, 120, Tolerance.None);

    // acid and base, temperature
    public static readonly Kind BicarbonateReported = Kind.Quantity("hco3-arterial", "HCO3lab", "bicarbonate of arterial blood as the analyser reports it", Laboratory, "mmol/L", 1, 80, Tolerance.Limit(1, 0, Judgement));
    public static readonly Kind BaseExcessReported = Kind.Quantity("base-excess-arterial", "BElab", "base excess of arterial blood as the analyser reports it", Laboratory, "mmol/L", -40, 40, Tolerance.Limit(1, 0, Judgement));
    public static readonly Kind BodyTemperature = Kind.Quantity("body-temperature", "temp", "body temperature", Measurement, "Cel", 10, 45, Tolerance.Limit(0.2, 0, Judgement));
    public static readonly Kind HemoglobinMolar = Kind.Quantity("hemoglobin-molar", "ctHb", "haemoglobin, molar (monomer)", Laboratory, "mmol/L", 1.2, 16, Tolerance.Limit(0, 0.04, "CLIA 2025 ±4 % (from memory)"));

    // lung function laboratory
    public static readonly Kind Dlco = Kind.Quantity("dlco", "DLCO", "diffusing capacity for carbon monoxide, single breath", Measurement, "mL/min/mm[Hg]", 1, 80, Tolerance.Deviation(1, 0, "2 mL/min/mm[Hg] between tests, from memory"));
    public static readonly Kind AlveolarVolume = Kind.Quantity("alveolar-volume", "VAeff", "alveolar volume of the single breath (BTPS)", Measurement, "L", 0.5, 12, Tolerance.Limit(0, 0.05, Judgement));
    public static readonly Kind MembraneConductanceNO = Kind.Quantity("membrane-conductance-no", "DM_NO", "membrane conductance for nitric oxide", Measurement, "mL/min/mm[Hg]", 10, 800, Tolerance.Limit(0, 0.15, Judgement));
    public static readonly Kind InverseThetaVc = Kind.Quantity("inverse-theta-capillary-volume", "inv_thetaVc", "resistance of the blood to carbon monoxide uptake, 1/(θ·Vc)", Measurement, "min.mm[Hg]/mL", 0.002, 0.2, Tolerance.Limit(0, 0.3, Judgement + ": from two oxygen levels or two gases"));
    public static readonly Kind BreathHoldPo2 = Kind.Quantity("alveolar-po2-breath-hold", "PAO2bh", "alveolar oxygen partial pressure during the breath-hold", Measurement, "mm[Hg]", 40, 700, Tolerance.Limit(10, 0, Judgement));
    public static readonly Kind DlcoGroup = Kind.Coded("dlco-hb-group", "group", "group whose haemoglobin adjustment holds", Demographic, "male >= 15 y", "female or < 15 y");

    // constants of definitions; those of one published set belong together
    public static readonly Kind CO2Conversion = Kind.Quantity("co2-conversion-factor", "factor", "tension of 1 mL/min (STPD) of carbon dioxide in 1 L/min (BTPS)", Constant, "mm[Hg].L/mL", 0.86, 0.8635, Tolerance.None, assumed: 0.863);
    public static readonly Kind CO2Solubility = Kind.Quantity("co2-solubility", "alphaCO2", "solubility of carbon dioxide in plasma", Constant, "mmol/L/mm[Hg]", 0.0303, 0.0308, Tolerance.None, assumed: 0.0307);
    public static readonly Kind CO2Pk = Kind.Quantity("carbonic-acid-pk", "pK", "apparent pK of carbonic acid in plasma", Constant, "[pH]", 6.095, 6.11, Tolerance.None, assumed: 6.105);
    public static readonly Kind CO2SolubilityZander = Fixed("co2-solubility-zander", "alphaZ", "solubility of carbon dioxide in plasma, Zander's set", "mmol/L/mm[Hg]", 0.0304);
    public static readonly Kind CO2PkZander = Fixed("carbonic-acid-pk-zander", "pKZ", "apparent pK of carbonic acid, Zander's set", "[pH]", 6.1);
    public static readonly Kind CO2SolubilitySiggaardAndersen = Fixed("co2-solubility-siggaard-andersen", "alphaS", "solubility of carbon dioxide in plasma, Siggaard-Andersen's set", "mmol/L/kPa", 0.230);
    public static readonly Kind CO2PkSiggaardAndersen = Fixed("carbonic-acid-pk-siggaard-andersen", "pKS", "apparent pK of carbonic acid, Siggaard-Andersen's set", "[pH]", 6.1);
    public static readonly Kind ThetaSlope = Kind.Quantity("theta-slope", "slope", "rise of 1/θ with oxygen tension", Constant, "1", 0.004, 0.0066, Tolerance.None, assumed: 0.0062);
    public static readonly Kind ThetaIntercept = Kind.Quantity("theta-intercept", "intercept", "1/θ without oxygen", Constant, "1", 0.99, 1.31, Tolerance.None, assumed: 1.16);
    public static readonly Kind DiffusivityRatio = Kind.Quantity("diffusivity-ratio-no-co", "alpha_NO_CO", "diffusivity of nitric oxide over that of carbon monoxide", Constant, "1", 1.9, 2.45, Tolerance.None, assumed: 1.97);
    public static readonly Kind EnergyFactor = Kind.Quantity("energy-expenditure-factor", "kREE", "true over predicted energy expenditure", Constant, "1", 0.4, 2.5, Tolerance.Deviation(0, 0.2, "predictive equations in intensive care, Ann Intensive Care 2016, doi:10.1186/s13613-016-0118-8"), assumed: 1);

    // circumstances that only gates look at
    public static readonly Kind Sample = Kind.Coded("sample", "sample", "site of the blood sample", Circumstance, "arterial", "venous", "central venous", "mixed venous", "capillary", "unknown");
    public static readonly Kind PatientEffort = Kind.Coded("patient-effort", "patient_effort", "breathing efforts of the patient", Circumstance, "false", "true");
    public static readonly Kind Mode = Kind.Coded("ventilator-mode", "mode", "ventilation mode", Circumstance, "volume control", "pressure control", "spontaneous", "other", "unknown");
    public static readonly Kind Support = Kind.Coded("respiratory-support", "support", "kind of respiratory support", Circumstance, "invasive ventilation", "non-invasive ventilation", "high-flow oxygen", "low-flow oxygen", "none");
    public static readonly Kind Waveform = Kind.Coded("flow-waveform", "waveform", "inspiratory flow waveform", Circumstance, "constant", "decelerating", "other");
    public static readonly Kind Ecls = Kind.Coded("extracorporeal-support", "ecls", "extracorporeal gas exchange", Circumstance, "false", "true");
    public static readonly Kind TemperatureCorrected = Kind.Coded("gas-temperature-corrected", "corrected", "whether the gas is already corrected to the patient's temperature", Circumstance, "false", "true");
    public static readonly Kind DlcoGrade = Kind.Coded("dlco-test-grade", "grade", "quality grade of the diffusing capacity manoeuvre", Circumstance, "acceptable", "unacceptable");
    public static readonly Kind FiO2Changed = Kind.Quantity("fio2-changed-before-draw", "FiO2_changed_before_draw", "time since FiO2 was changed", Circumstance, "min", 0, double.MaxValue, Tolerance.None);
    public static readonly Kind PeepLowered = Kind.Quantity("peep-lowered-before-draw", "PEEP_lowered_before_draw", "time since PEEP was lowered", Circumstance, "min", 0, double.MaxValue, Tolerance.None);
    public static readonly Kind PeepRaised = Kind.Quantity("peep-raised-before-draw", "PEEP_raised_before_draw", "time since PEEP was raised", Circumstance, "min", 0, double.MaxValue, Tolerance.None);
#pragma warning restore CS1591

    /// <summary>Every kind of this list.</summary>
    public static IReadOnlyList<Kind> All { get; } =
        [.. typeof(Kinds).GetFields().Where(field => field.FieldType == typeof(Kind)).Select(field => (Kind)field.GetValue(null)!)];

    /// <summary>A kind of this list by key; null when there is none.</summary>
    public static Kind? Find(string key) => ByKey.GetValueOrDefault(key);

    /// <summary>A root of value zero that carries the error of a dissociation curve into the uncertainty.</summary>
    private static Kind Misfit(string key, string symbol, string curve, double limit, string source) =>
        Kind.Quantity(key, symbol, $"misfit of the {curve} curve", Constant, "%", -3, 3, Tolerance.Limit(limit, 0, source), assumed: 0);

    /// <summary>A constant of a published set: part of a definition, never chosen.</summary>
    private static Kind Fixed(string key, string symbol, string name, string unit, double value) =>
        Kind.Quantity(key, symbol, name, Constant, unit, value * (1 - 1e-9), value * (1 + 1e-9), Tolerance.None, assumed: value);

    private static readonly Dictionary<string, Kind> ByKey = All.ToDictionary(kind => kind.Key, StringComparer.Ordinal);
}
