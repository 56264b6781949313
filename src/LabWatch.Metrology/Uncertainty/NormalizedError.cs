namespace LabWatch.Metrology.Uncertainty;

/// <summary>The number E_n by which two laboratories, or as-found and certificate, are compared: ISO/IEC 17043:2010, B.3.1.3.</summary>
public static class NormalizedError
{
    /// <summary>(x - X) / sqrt(U_x^2 + U_X^2); agreement where its magnitude is at most 1. The two must be independent.</summary>
    /// <param name="value">x.</param>
    /// <param name="expandedUncertainty">U of x at a coverage of about 95 %.</param>
    /// <param name="reference">X.</param>
    /// <param name="referenceExpandedUncertainty">U of X at the same coverage.</param>
    public static double Of(double value, double expandedUncertainty, double reference, double referenceExpandedUncertainty) =>
        (value - reference) / double.Hypot(expandedUncertainty, referenceExpandedUncertainty);
}
