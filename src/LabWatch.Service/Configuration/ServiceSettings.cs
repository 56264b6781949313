using LabWatch.Alerts;
using LabWatch.Assessments;
using LabWatch.Intake.Options;
using LabWatch.Readings;
using LabWatch.Records;

namespace LabWatch.Service.Configuration;

/// <summary>The options of every room, validated.</summary>
internal sealed record ServiceSettings(
    IntakeOptions Intake, ReadingsOptions Readings, RecordsOptions Records, AssessmentsOptions Assessments, AlertsOptions Alerts);
