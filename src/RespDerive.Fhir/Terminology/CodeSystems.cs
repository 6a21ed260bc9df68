namespace RespDerive.Fhir;

/// <summary>Addresses of the code systems that readings use.</summary>
public static class CodeSystems
{
    /// <summary>LOINC.</summary>
    public const string Loinc = "http://loinc.org";

    /// <summary>IEEE 11073-10101 nomenclature (MDC).</summary>
    public const string Mdc = "urn:iso:std:iso:11073:10101";

    /// <summary>SNOMED CT.</summary>
    public const string Snomed = "http://snomed.info/sct";

    /// <summary>UCUM.</summary>
    public const string Ucum = "http://unitsofmeasure.org";

    /// <summary>Specimen types of HL7 v2.</summary>
    public const string SpecimenType = "http://terminology.hl7.org/CodeSystem/v2-0487";

    /// <summary>Observation categories.</summary>
    public const string ObservationCategory = "http://terminology.hl7.org/CodeSystem/observation-category";
}
