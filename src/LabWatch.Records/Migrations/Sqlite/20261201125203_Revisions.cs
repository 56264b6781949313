using System;
using Microsoft.EntityFrameworkCore.Migrations;

#nullable disable

namespace LabWatch.Records.Migrations.Sqlite
{
    /// <inheritdoc />
    public partial class Revisions : Migration
    {
        /// <inheritdoc />
        protected override void Up(MigrationBuilder migrationBuilder)
        {
            migrationBuilder.AddColumn<string>(
                name: "reason",
                table: "lab_imports",
                type: "TEXT",
                nullable: true);

            migrationBuilder.CreateTable(
                name: "revisions",
                columns: table => new
                {
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    kind = table.Column<string>(type: "TEXT", nullable: false),
                    id = table.Column<string>(type: "TEXT", nullable: false),
                    revision = table.Column<int>(type: "INTEGER", nullable: false),
                    sequence = table.Column<long>(type: "INTEGER", nullable: false),
                    effective_from = table.Column<long>(type: "INTEGER", nullable: false),
                    author = table.Column<string>(type: "TEXT", nullable: false),
                    reason = table.Column<string>(type: "TEXT", nullable: false),
                    recorded_at = table.Column<long>(type: "INTEGER", nullable: false),
                    content = table.Column<string>(type: "TEXT", nullable: true),
                    digest = table.Column<string>(type: "TEXT", nullable: false),
                    import = table.Column<int>(type: "INTEGER", nullable: true)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_revisions", x => new { x.site, x.kind, x.id, x.revision });
                });

            migrationBuilder.CreateTable(
                name: "run_steps",
                columns: table => new
                {
                    run_id = table.Column<Guid>(type: "TEXT", nullable: false),
                    number = table.Column<int>(type: "INTEGER", nullable: false),
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    at = table.Column<long>(type: "INTEGER", nullable: false),
                    by = table.Column<string>(type: "TEXT", nullable: false),
                    what = table.Column<string>(type: "TEXT", nullable: false),
                    reason = table.Column<string>(type: "TEXT", nullable: true),
                    content = table.Column<string>(type: "TEXT", nullable: false),
                    request_key = table.Column<string>(type: "TEXT", nullable: true)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_run_steps", x => new { x.run_id, x.number });
                });

            migrationBuilder.CreateTable(
                name: "runs",
                columns: table => new
                {
                    id = table.Column<Guid>(type: "TEXT", nullable: false),
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    source = table.Column<string>(type: "TEXT", nullable: false),
                    number = table.Column<long>(type: "INTEGER", nullable: false),
                    job_number = table.Column<string>(type: "TEXT", nullable: false),
                    item = table.Column<string>(type: "TEXT", nullable: false),
                    set_point_celsius = table.Column<double>(type: "REAL", nullable: false),
                    band = table.Column<string>(type: "TEXT", nullable: true),
                    note = table.Column<string>(type: "TEXT", nullable: true),
                    started_at = table.Column<long>(type: "INTEGER", nullable: false),
                    started_by = table.Column<string>(type: "TEXT", nullable: false),
                    ended_at = table.Column<long>(type: "INTEGER", nullable: true),
                    ended_by = table.Column<string>(type: "TEXT", nullable: true),
                    override_reason = table.Column<string>(type: "TEXT", nullable: true),
                    readiness_at_start = table.Column<string>(type: "TEXT", nullable: false),
                    cancelled_at = table.Column<long>(type: "INTEGER", nullable: true),
                    step = table.Column<int>(type: "INTEGER", nullable: false)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_runs", x => x.id);
                });

            migrationBuilder.CreateIndex(
                name: "IX_revisions_site_sequence",
                table: "revisions",
                columns: new[] { "site", "sequence" },
                unique: true);

            migrationBuilder.CreateIndex(
                name: "IX_run_steps_site_by_request_key",
                table: "run_steps",
                columns: new[] { "site", "by", "request_key" },
                unique: true,
                filter: "request_key IS NOT NULL");

            migrationBuilder.CreateIndex(
                name: "IX_runs_number",
                table: "runs",
                column: "number",
                unique: true);

            migrationBuilder.CreateIndex(
                name: "IX_runs_site_source",
                table: "runs",
                columns: new[] { "site", "source" },
                unique: true,
                filter: "ended_at IS NULL AND cancelled_at IS NULL");

            migrationBuilder.CreateIndex(
                name: "IX_runs_started_at_number",
                table: "runs",
                columns: new[] { "started_at", "number" });
        }

        /// <inheritdoc />
        protected override void Down(MigrationBuilder migrationBuilder)
        {
            migrationBuilder.DropTable(
                name: "revisions");

            migrationBuilder.DropTable(
                name: "run_steps");

            migrationBuilder.DropTable(
                name: "runs");

            migrationBuilder.DropColumn(
                name: "reason",
                table: "lab_imports");
        }
    }
}
