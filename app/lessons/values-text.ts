import type { MarkValue } from "./mark";

type Row = Pick<MarkValue, "role" | "action" | "text">;

function ofRow(row: Row): string {
  if (row.action === "back-off") return `back off ${row.text}`;
  if (row.action === "wait") return `wait ${row.text}`;
  if (row.role === "min") return `min ${row.text}`;
  if (row.role === "max") return `max ${row.text}`;
  if (row.role === "limit") return `limit ${row.text}`;
  return row.text;
}

/**
 * The value rows of a mark as one line that reads back to the same rows: "20 Nm, 40 Nm, + 90°", "80 Nm - 95 Nm",
 * "24 mm ± 0.1 mm". Each row keeps the text as typed.
 */
export function valuesText(rows: readonly Row[]): string {
  let text = "";
  for (let n = 0; n < rows.length; n++) {
    const row = rows[n] as Row;
    const next = rows[n + 1];
    let piece = ofRow(row);
    let link = ", ";
    if (row.role === "min" && next?.role === "max" && next.action === row.action) {
      piece = `${row.text} - ${next.text}`;
      n += 1;
    } else if (row.role === "tolerance") link = " ± ";
    else if (row.role === "angle") link = " + ";
    else if (
      row.action === "seat" &&
      next?.role === "angle" &&
      /^(?:past|after|beyond|from)\b/i.test(row.text)
    ) {
      piece = `${next.text} ${row.text}`;
      n += 1;
    }
    text += text === "" ? piece : link + piece;
  }
  return text;
}
