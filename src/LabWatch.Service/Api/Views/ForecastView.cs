using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>How a quantity moves over the days at one set point, and when it would reach its limit.</summary>
internal sealed record ForecastView(
    [property: Description("Code of the criterion whose assessments it is taken from.")] string Criterion,
    [property: Description("Their scope: a band, a channel, or empty.")] string Scope,
    [property: Description("Id of the working band; null where it is about none.")] string? Band,
    [property: Description("emissivity-departure, radiance-temperature-offset, comparator-departure, comparator-minus-model, or value for the value of the criterion.")] string Quantity,
    [property: Description("Unit of every number of the quantity.")] string Unit,
    [property: Description("Set point, degree Celsius; null where unknown.")] double? SetPointCelsius,
    [property: Description("What the limits lie around: 0, or the mean of the first days.")] double Reference,
    [property: Description("Distance of the limit from the reference; null where none applies. For quantities with a sign there is one on either side.")] double? Limit,
    [property: Description("Means by UTC day since certificates and baseline last changed, oldest first.")] IReadOnlyList<DayMeanView> Days,
    [property: Description("Slope a year with its expanded uncertainty for autocorrelated noise; null below five days.")] EstimateView? SlopePerYear,
    [property: Description("Whether the slope is larger than its expanded uncertainty.")] bool IsSignificant,
    [property: Description("Theil-Sen slope a year; null below five days.")] double? MedianSlopePerYear,
    [property: Description("Mann-Kendall probability of so clear a trend without any; null below five days.")] double? MannKendallProbability,
    [property: Description("Autocorrelation of neighbouring days; null below five days.")] double? Autocorrelation,
    [property: Description("Height of the line at the first and at the last day; null below five days.")] IReadOnlyList<double>? Line,
    [property: Description("When the line reaches the limit; null where it moves away, or not within ten years.")] Instant? Expected,
    [property: Description("Earliest end of the 95 % interval; null where not within ten years.")] Instant? Earliest,
    [property: Description("Latest end; null where it may never be reached.")] Instant? Latest,
    [property: Description("Where the control charts stand; null while there are too few days.")] ChartStateView? Chart,
    [property: Description("Number of assessments that it rests on.")] int Assessments,
    [property: Description("SHA-256 over their ids in the order of their windows, each followed by a line feed.")] string Digest,
    [property: Description("All of it in plain words.")] string Explanation);
