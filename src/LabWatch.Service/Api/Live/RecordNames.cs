using System.Globalization;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;

namespace LabWatch.Service.Api.Live;

/// <summary>Names of revisions, <c>id@revision</c>.</summary>
internal static class RecordNames
{
    /// <summary>The name of a certificate's revision.</summary>
    public static string Of(Certificate certificate) => string.Create(CultureInfo.InvariantCulture, $"{certificate.Id}@{certificate.Revision}");

    /// <summary>The name of a limit's revision.</summary>
    public static string Of(AcceptanceLimit limit) => string.Create(CultureInfo.InvariantCulture, $"{limit.Id}@{limit.Revision}");
}
