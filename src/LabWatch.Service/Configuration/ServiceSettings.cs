using LabWatch.Alerts;
using LabWatch.Assessments;
using LabWatch.Intake.Options;
using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Web;

namespace LabWatch.Service.Configuration;

/// <summary>The options of every room, validated.</summary>
internal sealed record ServiceSettings(
    IntakeOptions Intake, ReadingsOptions Readings, RecordsOptions Records, AssessmentsOptions Assessments, AlertsOptions Alerts,
    AccessOptions Access, WebOptions Web);
