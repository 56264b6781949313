using System.Text;
using LabWatch.Evidence.Recording;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Records.Alerts;
using LabWatch.Records.Assessments;
using LabWatch.Records.Audit;
using LabWatch.Records.Revisions;
using LabWatch.Tests.Lab;
using LabWatch.Tests.Records.Contract;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.SystemTests.Evidence;

/// <summary>A data directory that the rooms themselves have written: lab records, assessments, alerts, sealed hours with supplements, and their trail.</summary>
internal static class TrialData
{
    private const int Hours = 12;
    private const int Assessments = 60;
    private const int Alerts = 12;

    public static async Task MakeAsync(string directory, CancellationToken cancellationToken)
    {
        ServiceCollection rooms = new();
        rooms.AddLabWatchRecords(RecordsOptions.InDirectory(directory)).AddLabWatchReadings(new ReadingsOptions { DataDirectory = directory });
        await using (ServiceProvider services = rooms.BuildServiceProvider())
        {
            await services.GetRequiredService<ILabRecords>().ImportAsync(
                new LabImportOrder(Encoding.UTF8.GetBytes(LabFileSample.Text.Replace("\"id\": \"sample\"", "\"id\": \"hollin-vale\"", StringComparison.Ordinal)), "lab.json", "kim", Sample.Noon), cancellationToken);
            await AssessAsync(services.GetRequiredService<IAssessmentLedger>(), cancellationToken);
            await AlertAsync(services.GetRequiredService<IAlertLedger>(), cancellationToken);
            await ReadAsync(services, cancellationToken);
            SealedHourRecorder recorder = new(
                services.GetRequiredService<IReadingStore>(), services.GetRequiredService<IAuditLedger>(), services.GetRequiredService<IPositionLedger>(), NullLogger<SealedHourRecorder>.Instance);
            await recorder.RecordAsync(cancellationToken);
            await services.GetServices<IHostedService>().OfType<TrailHeadKeeper>().Single().StopAsync(cancellationToken);
        }

        SqliteConnection.ClearAllPools();
    }

    private static async Task AssessAsync(IAssessmentLedger ledger, CancellationToken cancellationToken)
    {
        for (int window = 0; window < Assessments; window++)
        {
            await ledger.RecordAsync([Sample.Assessment(Sample.Fir, window), Sample.Assessment(Sample.Yew, window, criterion: "axial-uniformity", scope: "500")], cancellationToken);
            if (window % 5 == 0)
            {
                await ledger.RecordAsync(Sample.Assessment(Sample.Fir, window, revision: 2), cancellationToken);
            }
        }
    }

    private static async Task AlertAsync(IAlertLedger ledger, CancellationToken cancellationToken)
    {
        for (int i = 0; i < Alerts; i++)
        {
            Instant at = Sample.Noon + TimeSpan.FromMinutes(i);
            Alert alert = Sample.Alert(i % 2 == 0 ? Sample.Fir : Sample.Yew, Guid.CreateVersion7(), at);
            await ledger.RecordAsync(Sample.Raised(alert), [], cancellationToken);
            alert = alert with { State = AlertState.RaisedAcknowledged, AcknowledgedAt = at + TimeSpan.FromMinutes(1), AcknowledgedBy = "kim", AcknowledgeNote = "Barrier put up." };
            await ledger.RecordAsync(new AlertTransition(alert, 2, at + TimeSpan.FromMinutes(1), "acknowledged", "kim", "Barrier put up."), [], cancellationToken);
            if (i % 3 == 0)
            {
                alert = alert with { State = AlertState.Normal, ReturnedAt = at + TimeSpan.FromMinutes(9) };
                await ledger.RecordAsync(new AlertTransition(alert, 3, at + TimeSpan.FromMinutes(9), "returned", "labwatch", null), [], cancellationToken);
            }
        }
    }

    private static async Task ReadAsync(ServiceProvider services, CancellationToken cancellationToken)
    {
        IReadingStore store = services.GetRequiredService<IReadingStore>();
        IReadingSealer sealer = services.GetRequiredService<IReadingSealer>();
        Random random = new(5);
        for (int hour = 0; hour < Hours; hour++)
        {
            await store.AppendAsync([Pack(Sample.Fir, hour, 0, random), Pack(Sample.Yew, hour, 0, random)], cancellationToken);
        }

        await sealer.SealEverythingAsync(cancellationToken);
        await store.AppendAsync([Pack(Sample.Fir, 2, 1, random), Pack(Sample.Yew, 7, 1, random)], cancellationToken);
        await sealer.SealEverythingAsync(cancellationToken);
    }

    private static ReadingPack Pack(SourceKey source, int hour, int late, Random random)
    {
        Instant start = Sample.Noon + TimeSpan.FromHours(hour) + TimeSpan.FromMilliseconds(500 * late);
        List<Reading> readings = [];
        for (int i = 0; i < 180; i++)
        {
            Instant at = start + TimeSpan.FromSeconds(20 * i);
            readings.Add(new Reading("well-a", at, Math.Round(100 + random.NextDouble(), 3)));
            readings.Add(new Reading("well-b", at, 100 + random.NextDouble()));
        }

        return new ReadingPack(source, start, readings);
    }
}
