using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>
/// Readings of one channel as columns of equal length: raw readings where <c>bucketSeconds</c> is null, else one row a bucket that has
/// values (empty buckets are left out, so that gaps stay visible).
/// </summary>
internal sealed record ReadingsView(
    [property: Description("Key of the source, site.source.")] string Source,
    [property: Description("Id of the channel.")] string Channel,
    [property: Description("Unit of the raw values, by its SenML name.")] string Unit,
    [property: Description("First instant of the window.")] Instant From,
    [property: Description("First instant after the window.")] Instant To,
    [property: Description("Length of a bucket, seconds; null for raw readings.")] double? BucketSeconds,
    [property: Description("Device time, or start of the bucket.")] IReadOnlyList<Instant> Time,
    [property: Description("Raw value, or mean of the raw values in the bucket; null where there is none.")] IReadOnlyList<double?> Raw,
    [property: Description("Smallest raw value in the bucket; null for raw readings.")] IReadOnlyList<double>? RawMinimum,
    [property: Description("Largest raw value in the bucket; null for raw readings.")] IReadOnlyList<double>? RawMaximum,
    [property: Description("Number of values in the bucket; null for raw readings.")] IReadOnlyList<int>? Count,
    [property: Description("t90, degree Celsius, through the certificate in force at the time (at the start of the bucket); null for channels that are no thermometers.")] IReadOnlyList<double?>? Celsius,
    [property: Description("t90 of the coldest value in the bucket, degree Celsius.")] IReadOnlyList<double?>? CelsiusMinimum,
    [property: Description("t90 of the hottest value in the bucket, degree Celsius.")] IReadOnlyList<double?>? CelsiusMaximum,
    [property: Description("Quality bits of each raw reading (see the reference page of the readings); null for buckets.")] IReadOnlyList<int>? Quality);
