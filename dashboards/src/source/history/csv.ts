import type { Outcome } from "../../api/types";

const columns = ["window start", "window end", "source", "criterion", "scope", "revision", "value", "expanded uncertainty", "coverage factor", "unit", "limit", "decision", "computed at", "assessment"] as const;

/** Assessments as comma-separated values (RFC 4180), times in UTC, numbers as the service gave them. */
export function historyCsv(assessments: Outcome[]): string {
  const rows = assessments.map((assessment) => [
    assessment.windowStart,
    assessment.windowEnd,
    assessment.source,
    assessment.criterion,
    assessment.scope,
    assessment.revision,
    assessment.value,
    assessment.expandedUncertainty,
    assessment.coverageFactor,
    assessment.unit,
    assessment.limit,
    assessment.decision,
    assessment.computedAt,
    assessment.id,
  ]);
  return [columns, ...rows].map((row) => row.map(field).join(",")).join("\r\n") + "\r\n";
}

function field(value: string | number | null): string {
  const text = value === null ? "" : String(value);
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** Hands a text to the browser as a file. */
export function download(name: string, text: string): void {
  const address = URL.createObjectURL(new Blob([text], { type: "text/csv;charset=utf-8" }));
  const link = document.createElement("a");
  link.href = address;
  link.download = name;
  link.click();
  window.setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
