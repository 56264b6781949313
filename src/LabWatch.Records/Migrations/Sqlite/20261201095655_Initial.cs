using System;
using Microsoft.EntityFrameworkCore.Migrations;

#nullable disable

namespace LabWatch.Records.Migrations.Sqlite
{
    /// <inheritdoc />
    public partial class Initial : Migration
    {
        /// <inheritdoc />
        protected override void Up(MigrationBuilder migrationBuilder)
        {
            migrationBuilder.CreateTable(
                name: "alert_transitions",
                columns: table => new
                {
                    alert_id = table.Column<Guid>(type: "TEXT", nullable: false),
                    sequence = table.Column<int>(type: "INTEGER", nullable: false),
                    at = table.Column<long>(type: "INTEGER", nullable: false),
                    @event = table.Column<string>(name: "event", type: "TEXT", nullable: false),
                    by = table.Column<string>(type: "TEXT", nullable: false),
                    note = table.Column<string>(type: "TEXT", nullable: true),
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    priority = table.Column<string>(type: "TEXT", nullable: false),
                    state = table.Column<string>(type: "TEXT", nullable: false),
                    headline = table.Column<string>(type: "TEXT", nullable: false),
                    detail = table.Column<string>(type: "TEXT", nullable: false),
                    value = table.Column<double>(type: "REAL", nullable: true),
                    limit_value = table.Column<double>(type: "REAL", nullable: true),
                    unit = table.Column<string>(type: "TEXT", nullable: false),
                    returned_at = table.Column<long>(type: "INTEGER", nullable: true),
                    acknowledged_at = table.Column<long>(type: "INTEGER", nullable: true),
                    acknowledged_by = table.Column<string>(type: "TEXT", nullable: true),
                    acknowledge_note = table.Column<string>(type: "TEXT", nullable: true)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_alert_transitions", x => new { x.alert_id, x.sequence });
                });

            migrationBuilder.CreateTable(
                name: "alerts",
                columns: table => new
                {
                    id = table.Column<Guid>(type: "TEXT", nullable: false),
                    number = table.Column<long>(type: "INTEGER", nullable: false),
                    source = table.Column<string>(type: "TEXT", nullable: false),
                    code = table.Column<string>(type: "TEXT", nullable: false),
                    subject = table.Column<string>(type: "TEXT", nullable: false),
                    raised_at = table.Column<long>(type: "INTEGER", nullable: false),
                    transition = table.Column<int>(type: "INTEGER", nullable: false),
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    priority = table.Column<string>(type: "TEXT", nullable: false),
                    state = table.Column<string>(type: "TEXT", nullable: false),
                    headline = table.Column<string>(type: "TEXT", nullable: false),
                    detail = table.Column<string>(type: "TEXT", nullable: false),
                    value = table.Column<double>(type: "REAL", nullable: true),
                    limit_value = table.Column<double>(type: "REAL", nullable: true),
                    unit = table.Column<string>(type: "TEXT", nullable: false),
                    returned_at = table.Column<long>(type: "INTEGER", nullable: true),
                    acknowledged_at = table.Column<long>(type: "INTEGER", nullable: true),
                    acknowledged_by = table.Column<string>(type: "TEXT", nullable: true),
                    acknowledge_note = table.Column<string>(type: "TEXT", nullable: true)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_alerts", x => x.id);
                });

            migrationBuilder.CreateTable(
                name: "assessment_heads",
                columns: table => new
                {
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    source = table.Column<string>(type: "TEXT", nullable: false),
                    criterion = table.Column<string>(type: "TEXT", nullable: false),
                    scope = table.Column<string>(type: "TEXT", nullable: false),
                    window_end = table.Column<long>(type: "INTEGER", nullable: false),
                    revision = table.Column<int>(type: "INTEGER", nullable: false),
                    assessment_id = table.Column<string>(type: "TEXT", nullable: false)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_assessment_heads", x => new { x.site, x.source, x.criterion, x.scope });
                });

            migrationBuilder.CreateTable(
                name: "assessments",
                columns: table => new
                {
                    id = table.Column<string>(type: "TEXT", nullable: false),
                    sequence = table.Column<long>(type: "INTEGER", nullable: false),
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    source = table.Column<string>(type: "TEXT", nullable: false),
                    criterion = table.Column<string>(type: "TEXT", nullable: false),
                    scope = table.Column<string>(type: "TEXT", nullable: false),
                    window_start = table.Column<long>(type: "INTEGER", nullable: false),
                    window_end = table.Column<long>(type: "INTEGER", nullable: false),
                    revision = table.Column<int>(type: "INTEGER", nullable: false),
                    value = table.Column<double>(type: "REAL", nullable: true),
                    standard_uncertainty = table.Column<double>(type: "REAL", nullable: true),
                    degrees_of_freedom = table.Column<double>(type: "REAL", nullable: true),
                    unit = table.Column<string>(type: "TEXT", nullable: false),
                    limit_value = table.Column<double>(type: "REAL", nullable: true),
                    coverage_factor = table.Column<double>(type: "REAL", nullable: true),
                    decision = table.Column<string>(type: "TEXT", nullable: false),
                    conformity_probability = table.Column<double>(type: "REAL", nullable: true),
                    figures = table.Column<string>(type: "TEXT", nullable: false),
                    explanation = table.Column<string>(type: "TEXT", nullable: false),
                    provenance = table.Column<string>(type: "TEXT", nullable: false),
                    computed_at = table.Column<long>(type: "INTEGER", nullable: false),
                    supersede_reason = table.Column<string>(type: "TEXT", nullable: true)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_assessments", x => x.id);
                });

            migrationBuilder.CreateTable(
                name: "lab_imports",
                columns: table => new
                {
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    sequence = table.Column<int>(type: "INTEGER", nullable: false),
                    digest = table.Column<string>(type: "TEXT", nullable: false),
                    document = table.Column<string>(type: "TEXT", nullable: false),
                    at = table.Column<long>(type: "INTEGER", nullable: false),
                    by = table.Column<string>(type: "TEXT", nullable: false)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_lab_imports", x => new { x.site, x.sequence });
                });

            migrationBuilder.CreateTable(
                name: "outbox",
                columns: table => new
                {
                    id = table.Column<string>(type: "TEXT", nullable: false),
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    alert_id = table.Column<Guid>(type: "TEXT", nullable: false),
                    notifier = table.Column<string>(type: "TEXT", nullable: false),
                    body = table.Column<string>(type: "TEXT", nullable: false),
                    queued_at = table.Column<long>(type: "INTEGER", nullable: false),
                    due_at = table.Column<long>(type: "INTEGER", nullable: false),
                    attempts = table.Column<int>(type: "INTEGER", nullable: false),
                    sent_at = table.Column<long>(type: "INTEGER", nullable: true),
                    given_up_at = table.Column<long>(type: "INTEGER", nullable: true),
                    last_error = table.Column<string>(type: "TEXT", nullable: true)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_outbox", x => x.id);
                });

            migrationBuilder.CreateTable(
                name: "positions",
                columns: table => new
                {
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    reader = table.Column<string>(type: "TEXT", nullable: false),
                    position = table.Column<long>(type: "INTEGER", nullable: false)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_positions", x => new { x.site, x.reader });
                });

            migrationBuilder.CreateTable(
                name: "watermarks",
                columns: table => new
                {
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    source = table.Column<string>(type: "TEXT", nullable: false),
                    criterion = table.Column<string>(type: "TEXT", nullable: false),
                    window_end = table.Column<long>(type: "INTEGER", nullable: false)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_watermarks", x => new { x.site, x.source, x.criterion });
                });

            migrationBuilder.CreateIndex(
                name: "IX_alerts_number",
                table: "alerts",
                column: "number",
                unique: true);

            migrationBuilder.CreateIndex(
                name: "IX_alerts_raised_at_number",
                table: "alerts",
                columns: new[] { "raised_at", "number" });

            migrationBuilder.CreateIndex(
                name: "IX_alerts_state",
                table: "alerts",
                column: "state");

            migrationBuilder.CreateIndex(
                name: "IX_assessments_sequence",
                table: "assessments",
                column: "sequence",
                unique: true);

            migrationBuilder.CreateIndex(
                name: "IX_assessments_site_source_criterion_window_end_window_start_scope_revision",
                table: "assessments",
                columns: new[] { "site", "source", "criterion", "window_end", "window_start", "scope", "revision" },
                unique: true);

            migrationBuilder.CreateIndex(
                name: "IX_assessments_window_end_sequence",
                table: "assessments",
                columns: new[] { "window_end", "sequence" });

            migrationBuilder.CreateIndex(
                name: "IX_outbox_alert_id",
                table: "outbox",
                column: "alert_id");

            migrationBuilder.CreateIndex(
                name: "IX_outbox_due_at",
                table: "outbox",
                column: "due_at",
                filter: "sent_at IS NULL AND given_up_at IS NULL");
        }

        /// <inheritdoc />
        protected override void Down(MigrationBuilder migrationBuilder)
        {
            migrationBuilder.DropTable(
                name: "alert_transitions");

            migrationBuilder.DropTable(
                name: "alerts");

            migrationBuilder.DropTable(
                name: "assessment_heads");

            migrationBuilder.DropTable(
                name: "assessments");

            migrationBuilder.DropTable(
                name: "lab_imports");

            migrationBuilder.DropTable(
                name: "outbox");

            migrationBuilder.DropTable(
                name: "positions");

            migrationBuilder.DropTable(
                name: "watermarks");
        }
    }
}
