namespace LabWatch.Service.Api;

/// <summary>Numbers on their way into JSON, which knows neither NaN nor infinity.</summary>
internal static class Numbers
{
    /// <summary>The number, or null where it is not finite.</summary>
    public static double? OrNull(double value) => double.IsFinite(value) ? value : null;
}
