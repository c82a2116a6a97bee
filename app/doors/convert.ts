import { convert } from "~/quantities/convert";
import { formatQuantity } from "~/quantities/format";
import { readQuantity, readUnit } from "~/quantities/parse";
import { dimensionOf } from "~/quantities/units";

/** `convert TEXT UNIT`: prints `{value, unit, text}`; a refused text prints `{error, at}` and exits with 1. */
function main(text: string | undefined, to: string | undefined): void {
  if (text === undefined || to === undefined)
    return refuse('Give a value and a unit, like: convert "65 ft-lb" N·m', 0);
  const unit = readUnit(to);
  if (!unit.ok) return refuse(unit.error, unit.at);
  const read = readQuantity(text, { dimension: dimensionOf(unit.unit) });
  if (!read.ok) return refuse(read.error, read.at);
  const value = convert(read.quantity, unit.unit);
  console.log(
    JSON.stringify({ value, unit: unit.unit, text: formatQuantity(read.quantity, unit.unit).text }),
  );
}

function refuse(error: string, at: number): void {
  console.log(JSON.stringify({ error, at }));
  process.exitCode = 1;
}

main(process.argv[2], process.argv[3]);
