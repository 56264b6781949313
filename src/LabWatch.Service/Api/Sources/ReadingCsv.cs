using System.Globalization;
using System.Text;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Sources;

/// <summary>Readings as CSV (RFC 4180): one header line, units in the column names, full stops as decimal marks, CR LF.</summary>
internal static class ReadingCsv
{
    /// <summary>Writes all rows.</summary>
    public static async Task WriteAsync(Stream stream, ReadingsView view, CancellationToken cancellationToken)
    {
        StreamWriter writer = new(stream, new UTF8Encoding(encoderShouldEmitUTF8Identifier: false), 16_384, leaveOpen: true) { NewLine = "\r\n" };
        await using (writer.ConfigureAwait(false))
        {
            bool isRaw = view.BucketSeconds is null;
            await writer.WriteLineAsync((isRaw ? RawHeader(view) : BucketHeader(view)).AsMemory(), cancellationToken).ConfigureAwait(false);
            for (int i = 0; i < view.Time.Count; i++)
            {
                await writer.WriteLineAsync((isRaw ? RawRow(view, i) : BucketRow(view, i)).AsMemory(), cancellationToken).ConfigureAwait(false);
            }
        }
    }

    private static string RawHeader(ReadingsView view) => $"time,raw ({Unit(view)}){(view.Celsius is null ? string.Empty : ",t90 (degC)")},quality";

    private static string RawRow(ReadingsView view, int i) =>
        $"{view.Time[i]},{Text(view.Raw[i])}{(view.Celsius is null ? string.Empty : "," + Text(view.Celsius[i]))},{view.Quality![i].ToString(CultureInfo.InvariantCulture)}";

    private static string BucketHeader(ReadingsView view) =>
        $"bucket start,count,raw mean ({Unit(view)}),raw minimum ({Unit(view)}),raw maximum ({Unit(view)})"
        + (view.Celsius is null ? string.Empty : ",t90 mean (degC),t90 minimum (degC),t90 maximum (degC)");

    private static string BucketRow(ReadingsView view, int i) =>
        $"{view.Time[i]},{view.Count![i].ToString(CultureInfo.InvariantCulture)},{Text(view.Raw[i])},{Text(view.RawMinimum![i])},{Text(view.RawMaximum![i])}"
        + (view.Celsius is null ? string.Empty : $",{Text(view.Celsius[i])},{Text(view.CelsiusMinimum![i])},{Text(view.CelsiusMaximum![i])}");

    private static string Unit(ReadingsView view) => view.Unit.Replace("\"", string.Empty, StringComparison.Ordinal).Replace(",", string.Empty, StringComparison.Ordinal);

    private static string Text(double? value) => value?.ToString("R", CultureInfo.InvariantCulture) ?? string.Empty;
}
