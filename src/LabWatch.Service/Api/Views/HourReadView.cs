using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>A source-hour that an assessment read.</summary>
internal sealed record HourReadView(
    [property: Description("Start of the hour.")] Instant Hour,
    [property: Description("Revision of the hour when it was read.")] long Revision);
