using System;
using Microsoft.EntityFrameworkCore.Migrations;

#nullable disable

namespace LabWatch.Records.Migrations.Sqlite
{
    /// <inheritdoc />
    public partial class People : Migration
    {
        /// <inheritdoc />
        protected override void Up(MigrationBuilder migrationBuilder)
        {
            migrationBuilder.CreateTable(
                name: "account_use",
                columns: table => new
                {
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    name = table.Column<string>(type: "TEXT", nullable: false),
                    last_sign_in_at = table.Column<long>(type: "INTEGER", nullable: true),
                    failures = table.Column<int>(type: "INTEGER", nullable: false),
                    last_failure_at = table.Column<long>(type: "INTEGER", nullable: true)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_account_use", x => new { x.site, x.name });
                });

            migrationBuilder.CreateTable(
                name: "accounts",
                columns: table => new
                {
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    name = table.Column<string>(type: "TEXT", nullable: false),
                    revision = table.Column<int>(type: "INTEGER", nullable: false),
                    display_name = table.Column<string>(type: "TEXT", nullable: false),
                    roles = table.Column<string>(type: "TEXT", nullable: false),
                    disabled = table.Column<bool>(type: "INTEGER", nullable: false),
                    must_change_password = table.Column<bool>(type: "INTEGER", nullable: false),
                    password = table.Column<string>(type: "TEXT", nullable: true),
                    at = table.Column<long>(type: "INTEGER", nullable: false),
                    by = table.Column<string>(type: "TEXT", nullable: false)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_accounts", x => new { x.site, x.name, x.revision });
                });

            migrationBuilder.CreateTable(
                name: "sessions",
                columns: table => new
                {
                    id = table.Column<Guid>(type: "TEXT", nullable: false),
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    account = table.Column<string>(type: "TEXT", nullable: false),
                    digest = table.Column<string>(type: "TEXT", nullable: false),
                    started_at = table.Column<long>(type: "INTEGER", nullable: false),
                    confirmed_at = table.Column<long>(type: "INTEGER", nullable: false),
                    last_used_at = table.Column<long>(type: "INTEGER", nullable: false),
                    expires_at = table.Column<long>(type: "INTEGER", nullable: false),
                    address = table.Column<string>(type: "TEXT", nullable: false),
                    agent = table.Column<string>(type: "TEXT", nullable: false)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_sessions", x => x.id);
                });

            migrationBuilder.CreateTable(
                name: "tokens",
                columns: table => new
                {
                    id = table.Column<Guid>(type: "TEXT", nullable: false),
                    site = table.Column<string>(type: "TEXT", nullable: false),
                    account = table.Column<string>(type: "TEXT", nullable: false),
                    name = table.Column<string>(type: "TEXT", nullable: false),
                    digest = table.Column<string>(type: "TEXT", nullable: false),
                    roles = table.Column<string>(type: "TEXT", nullable: false),
                    created_at = table.Column<long>(type: "INTEGER", nullable: false),
                    expires_at = table.Column<long>(type: "INTEGER", nullable: false),
                    last_used_at = table.Column<long>(type: "INTEGER", nullable: true),
                    revoked_at = table.Column<long>(type: "INTEGER", nullable: true),
                    revoked_by = table.Column<string>(type: "TEXT", nullable: true)
                },
                constraints: table =>
                {
                    table.PrimaryKey("PK_tokens", x => x.id);
                });

            migrationBuilder.CreateIndex(
                name: "IX_sessions_digest",
                table: "sessions",
                column: "digest",
                unique: true);

            migrationBuilder.CreateIndex(
                name: "IX_sessions_site_account",
                table: "sessions",
                columns: new[] { "site", "account" });

            migrationBuilder.CreateIndex(
                name: "IX_tokens_digest",
                table: "tokens",
                column: "digest",
                unique: true);

            migrationBuilder.CreateIndex(
                name: "IX_tokens_site_account",
                table: "tokens",
                columns: new[] { "site", "account" });
        }

        /// <inheritdoc />
        protected override void Down(MigrationBuilder migrationBuilder)
        {
            migrationBuilder.DropTable(
                name: "account_use");

            migrationBuilder.DropTable(
                name: "accounts");

            migrationBuilder.DropTable(
                name: "sessions");

            migrationBuilder.DropTable(
                name: "tokens");
        }
    }
}
