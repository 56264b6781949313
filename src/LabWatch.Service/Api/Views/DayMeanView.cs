using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>The mean of a followed quantity over one UTC day.</summary>
internal sealed record DayMeanView(
    [property: Description("Mean of the windows' ends.")] Instant At,
    [property: Description("Mean, in unit.")] double Value,
    [property: Description("Assessments in it.")] int Count);
