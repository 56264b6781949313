namespace LabWatch.Lab.Sources;

/// <summary>How the radiance of a source is traceable to the SI.</summary>
public enum TraceabilityRoute
{
    /// <summary>A calibrated thermometer in a well gives t90; the effective emissivity turns it into radiance.</summary>
    Contact,

    /// <summary>A standard radiation thermometer sighted into the cavity is the reference; the source is a transfer source.</summary>
    Radiometric,
}
