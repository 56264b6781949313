using System.Globalization;
using LabWatch.Service.Api.Views;
using LabWatch.Simulator.Demo;

namespace LabWatch.Service.Api.Demo;

/// <summary>How far the demo's history is, as the API shows it.</summary>
internal static class DemoProgress
{
    /// <summary>The progress; null when the history is there.</summary>
    public static DemoProgressView? Of(HistoryProgress progress)
    {
        if (progress.Done)
        {
            return null;
        }

        double fraction = Math.Round(Math.Clamp(progress.Fraction, 0, 1), 4);
        return progress is { From: { } from, To: { } to }
            ? new DemoProgressView(fraction, Text(fraction, to - from))
            : new DemoProgressView(0, "The demo's history is about to be filled.");
    }

    private static string Text(double fraction, TimeSpan whole) =>
        string.Create(CultureInfo.InvariantCulture, $"Filling history: {fraction * whole.TotalDays:F1} of {whole.TotalDays:F0} days.");
}
