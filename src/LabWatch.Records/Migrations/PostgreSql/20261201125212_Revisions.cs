using System;
using Microsoft.EntityFrameworkCore.Migrations;

#nullable disable

namespace LabWatch.Records.Migrations.PostgreSql
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
                type: "text",
                nullable: true);

            migrationBuilder.CreateTable(
                name: "revisions",
                columns: table => new
                {
                    site = table.Column<string>(type: "text", nullable: false),
                    kind = table.Column<string>(type: "text", nullable: false),
                    id = table.Column<string>(type: "text", nullable: false),
                    revision = table.Column<int>(type: "integer", nullable: false),
                    sequence = table.Column<long>(type: "bigint", nullable: false),
                    effective_from = table.Column<long>(type: "bigint", nullable: false),
                    author = table.Column<string>(type: "text", nullable: false),
                    reason = table.Column<string>(type: "text", nullable: false),
                    recorded_at = table.Column<long>(type: "bigint", nullable: false),
                    content = table.Column<string>(type: "text", nullable: true),
                    digest = table.Column<string>(type: "text", nullable: false),
                    import = table.Column<int>(type: "integer", nullable: true)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_revisions", x => new { x.site, x.kind, x.id, x.revision });
                });

            migrationBuilder.CreateTable(
                name: "run_steps",
                columns: table => new
                {
                    run_id = table.Column<Guid>(type: "uuid", nullable: false),
                    number = table.Column<int>(type: "integer", nullable: false),
                    site = table.Column<string>(type: "text", nullable: false),
                    at = table.Column<long>(type: "bigint", nullable: false),
                    by = table.Column<string>(type: "text", nullable: false),
                    what = table.Column<string>(type: "text", nullable: false),
                    reason = table.Column<string>(type: "text", nullable: true),
                    content = table.Column<string>(type: "text", nullable: false),
                    request_key = table.Column<string>(type: "text", nullable: true)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_run_steps", x => new { x.run_id, x.number });
                });

            migrationBuilder.CreateTable(
                name: "runs",
                columns: table => new
                {
                    id = table.Column<Guid>(type: "uuid", nullable: false),
                    site = table.Column<string>(type: "text", nullable: false),
                    source = table.Column<string>(type: "text", nullable: false),
                    number = table.Column<long>(type: "bigint", nullable: false),
                    job_number = table.Column<string>(type: "text", nullable: false),
                    item = table.Column<string>(type: "text", nullable: false),
                    set_point_celsius = table.Column<double>(type: "double precision", nullable: false),
                    band = table.Column<string>(type: "text", nullable: true),
                    note = table.Column<string>(type: "text", nullable: true),
                    started_at = table.Column<long>(type: "bigint", nullable: false),
                    started_by = table.Column<string>(type: "text", nullable: false),
                    ended_at = table.Column<long>(type: "bigint", nullable: true),
                    ended_by = table.Column<string>(type: "text", nullable: true),
                    override_reason = table.Column<string>(type: "text", nullable: true),
                    readiness_at_start = table.Column<string>(type: "text", nullable: false),
                    cancelled_at = table.Column<long>(type: "bigint", nullable: true),
                    step = table.Column<int>(type: "integer", nullable: false)
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
