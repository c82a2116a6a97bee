import { plus, toNumber } from "./exact";
import { convertNumber } from "./convert";
import { startReading } from "./parse";
import { isFraction, lastPlace, type Quantity } from "./quantity";
import { anyPhraseAt, PHRASES } from "./read-phrase";
import { refuse, type Refusal } from "./refusal";
import {
  bareUnitOf,
  scanQuantityAt,
  settleQuantity,
  withoutUnit,
  type Reading,
  type ReadOptions,
  type Scanned,
} from "./scan-quantity";
import { readUnitAt } from "./unit-spellings";
import { dimensionOf, sameKind, type Dimension, type Unit } from "./units";
import type { StepAction, TypedValue, ValueRole } from "./value";

/** How a value hangs on the one before it. */
type Link = "first" | "then" | "plus" | "comma" | "or";

/** A value as read, with what a grader has to know about how it was typed. */
export type ReadValue = TypedValue & Readonly<{ link: Link; unitTyped: boolean; at: number }>;

type Sense = "min" | "max" | "limit" | null;

/** How many values one text may hold; nobody tightens in more stages. */
const MOST_VALUES = 24;

function skip(s: string, i: number): number {
  let next = i;
  while (s[next] === " ") next++;
  return next;
}

const ANGLE_TOO: readonly Dimension[] = ["angle", "time", "ratio"];

class Reader {
  pos = 0;
  link: Link = "first";
  parens = 0;
  readonly rows: ReadValue[] = [];

  constructor(
    readonly r: Reading,
    readonly plainRole: ValueRole,
  ) {}

  text(from: number, to: number): string {
    return this.r.source.slice(from, to).trim();
  }

  take(phrases: readonly string[]): boolean {
    const end = anyPhraseAt(this.r.s, this.pos, phrases);
    if (end < 0) return false;
    this.pos = skip(this.r.s, end);
    return true;
  }

  action(action: StepAction, from: number): null {
    this.rows.push({
      role: "stage",
      action,
      quantity: null,
      text: this.text(from, this.pos),
      link: this.link,
      unitTyped: true,
      at: from,
    });
    return null;
  }

  value(
    role: ValueRole,
    action: StepAction | null,
    quantity: Quantity,
    at: number,
    unitTyped: boolean,
  ): void {
    this.rows.push({ role, action, quantity, text: quantity.text, link: this.link, unitTyped, at });
  }

  lastTorque(): boolean {
    return this.rows.some((row) => row.quantity?.dimension === "torque" && row.role !== "tolerance");
  }

  run(): Refusal | null {
    const { s } = this.r;
    this.pos = skip(s, 0);
    while (this.pos < s.length) {
      if (this.rows.length >= MOST_VALUES)
        return refuse(
          "trailing",
          this.pos,
          "Those are more values than one fastener takes. Type one fastener.",
        );
      const refused = this.element();
      if (refused) return refused;
      if (!this.separator()) break;
    }
    if (this.pos < s.length) return this.unread();
    if (this.rows.length === 0)
      return refuse("no-number", 0, "There is no number here. Type a number and its unit, like 88 N·m.");
    return null;
  }

  unread(): Refusal {
    const rest = this.r.source.slice(this.pos, this.pos + 24).trim();
    if (this.rows.length === 0)
      return refuse(
        "no-number",
        this.pos,
        `“${rest}” is not a number. Type a number and its unit, like 88 N·m.`,
      );
    return refuse("trailing", this.pos, `“${rest}” was not understood. Type the value alone.`);
  }

  /** Moves over what stands between two values; false when the next character begins no value. */
  separator(): boolean {
    const { s } = this.r;
    let link: Link | null = null;
    for (;;) {
      while (s[this.pos] === ")" && this.parens > 0) {
        this.parens--;
        this.pos = skip(s, this.pos + 1);
      }
      const before = this.pos;
      if (s[this.pos] === "." && (s[this.pos + 1] === " " || this.pos + 1 >= s.length))
        this.pos = skip(s, this.pos + 1);
      else if (this.take(PHRASES.separators)) {
        const word = s.slice(before, this.pos).trim();
        if (word === "+" || /^plus$/i.test(word) || link === "plus") link = "plus";
        else if (word === "," && link === null) link = "comma";
        else link = "then";
      } else if (this.take(PHRASES.or)) {
        if (s[before] === "(") this.parens++;
        link ??= "or";
      } else break;
    }
    this.link = link ?? "or";
    return this.pos < s.length;
  }

  element(): Refusal | null {
    const { s } = this.r;
    let from = this.pos;
    let further = false;
    let between = false;
    let sense: Sense = null;
    for (;;) {
      const at = this.pos;
      if (this.take(PHRASES.turning)) return this.action("turn-while-tightening", at);
      if (this.take(PHRASES.wait)) return this.waiting(at);
      const loosen = anyPhraseAt(s, at, PHRASES.loosen);
      const backOff = anyPhraseAt(s, at, PHRASES.backOff);
      if (loosen >= 0 || backOff >= 0)
        return this.loosening(at, Math.max(loosen, backOff), loosen >= backOff);
      if (this.take(PHRASES.seat)) return this.action("seat", at);
      if (this.take(PHRASES.min)) sense = "min";
      else if (this.take(PHRASES.max)) sense = "max";
      else if (this.take(PHRASES.limit)) sense = "limit";
      else if (this.take(["between", "from"])) between = true;
      else if (this.take(PHRASES.angleFirst)) further = true;
      else if (!this.take(PHRASES.filler)) break;
      from = this.pos;
    }
    return this.figure(from, sense, further, between);
  }

  waiting(from: number): Refusal | null {
    const scanned = scanQuantityAt(this.r, this.pos);
    if (!scanned)
      return refuse("no-number", this.pos, "How long is the wait? Type it with its unit, like wait 5 min.");
    if (!scanned.ok) return scanned;
    if (!scanned.unit || dimensionOf(scanned.unit) !== "time")
      return refuse("no-unit", scanned.end, `${this.text(scanned.start, scanned.end)}: s, min or h?`);
    const quantity = settleQuantity(this.r, scanned, scanned.unit);
    if ("ok" in quantity) return quantity;
    this.pos = skip(this.r.s, scanned.end);
    this.value("stage", "wait", quantity, from, true);
    return null;
  }

  loosening(from: number, after: number, wordIsLoosen: boolean): Refusal | null {
    const { s } = this.r;
    this.pos = skip(s, after);
    const start = this.pos;
    this.take(["by", "a", "through"]);
    const scanned = scanQuantityAt(this.r, this.pos);
    if (scanned && !scanned.ok) return scanned;
    if (scanned?.unit && dimensionOf(scanned.unit) === "angle") {
      const quantity = settleQuantity(this.r, scanned, scanned.unit);
      if ("ok" in quantity) return quantity;
      this.pos = skip(s, scanned.end);
      this.value("stage", "back-off", quantity, from, true);
      return null;
    }
    if (scanned && !scanned.unit) return withoutUnit({ ...this.r, options: { dimension: "angle" } }, scanned);
    this.pos = start;
    return this.action(wordIsLoosen ? "loosen" : "back-off", from);
  }

  unitFor(scanned: Scanned, further: boolean): { unit: Unit; typed: boolean } | null {
    if (scanned.unit) return { unit: scanned.unit, typed: true };
    const degrees =
      (this.link === "plus" || further) &&
      this.lastTorque() &&
      !scanned.fraction &&
      [undefined, "torque"].includes(this.r.options.dimension);
    if (degrees) return { unit: "deg", typed: false };
    // "turn 3/4" is no length.
    const bare = further ? null : bareUnitOf(this.r, scanned);
    return bare ? { unit: bare, typed: false } : null;
  }

  figure(from: number, sense: Sense, further: boolean, between: boolean): Refusal | null {
    const { s } = this.r;
    const scanned = scanQuantityAt(this.r, this.pos);
    if (scanned === null) return this.unread();
    if (!scanned.ok) return scanned;
    this.pos = skip(s, scanned.end);

    const second = this.rangeEnd(between);
    if (second) return second.ok ? this.range(scanned, second, sense, further) : second;

    const refused = this.tolerances(scanned, sense, further, from);
    if (refused !== undefined) return refused;

    const settled = this.unitFor(scanned, further);
    if (!settled) return withoutUnit(this.r, scanned);
    const quantity = settleQuantity(this.r, scanned, settled.unit);
    if ("ok" in quantity) return quantity;
    this.place(quantity, this.senseBehind(sense), further, scanned.start, settled.typed);
    return null;
  }

  senseBehind(sense: Sense): Sense {
    if (sense) return sense;
    if (this.take(PHRASES.maxBehind)) return "max";
    if (this.take(PHRASES.minBehind)) return "min";
    return null;
  }

  /** Files one quantity as a value, a limit, a stage or an angle. */
  place(quantity: Quantity, sense: Sense, further: boolean, at: number, typed: boolean): void {
    const { dimension } = quantity;
    const before = this.pos;
    if (dimension === "angle" && this.take(PHRASES.pastSeat)) {
      const contact = this.text(before, this.pos);
      const seat: ReadValue = {
        role: "stage",
        action: "seat",
        quantity: null,
        text: contact,
        link: this.link,
        unitTyped: true,
        at: before,
      };
      if (!this.rows.some((row) => row.action === "seat")) this.rows.push(seat);
      this.value(sense ?? "angle", "angle", quantity, at, typed);
      return;
    }
    if (dimension === "angle") {
      const tightening = this.rows.some((row) => row.action !== null && row.action !== "wait");
      const turned =
        tightening || further || quantity.unit === "turn" || this.r.source.trimStart().startsWith("+");
      this.value(sense ?? (turned ? "angle" : this.plainRole), turned ? "angle" : null, quantity, at, typed);
      return;
    }
    this.value(sense ?? this.plainRole, dimension === "torque" ? "torque" : null, quantity, at, typed);
  }

  rangeEnd(between: boolean): Scanned | Refusal | null {
    const { s } = this.r;
    const here = this.pos;
    if (!this.take(PHRASES.to) && !(between && this.take(["and"]))) return null;
    // "to" before a word is no range: "tighten to contact".
    const next = scanQuantityAt(this.r, this.pos);
    if (next === null) this.pos = here;
    if (next?.ok) this.pos = skip(s, next.end);
    return next;
  }

  range(low: Scanned, high: Scanned, sense: Sense, further: boolean): Refusal | null {
    const highUnit = this.unitFor(high.unit || !low.unit ? high : { ...high, unit: low.unit }, further);
    if (!highUnit) return withoutUnit(this.r, high);
    const lowUnit = low.unit ?? highUnit.unit;
    if (dimensionOf(lowUnit) !== dimensionOf(highUnit.unit))
      return refuse(
        "wrong-dimension",
        high.start,
        `${lowUnit} and ${highUnit.unit} make no range. For a torque and an angle write 30 N·m + 90°.`,
      );
    if (sense)
      return refuse("trailing", low.start, "A range has both ends already. Leave out the word before it.");
    const word = (scanned: Scanned, unit: Unit) =>
      scanned.unit
        ? undefined
        : `${this.text(scanned.start, scanned.end)} ${this.unitWord(low, high) ?? unit}`;
    const a = settleQuantity(this.r, low, lowUnit, word(low, lowUnit));
    if ("ok" in a) return a;
    const b = settleQuantity(this.r, high, highUnit.unit, word(high, highUnit.unit));
    if ("ok" in b) return b;
    if (a.si > b.si)
      return refuse(
        "order",
        low.start,
        `${a.text} is more than ${b.text}. Write the smaller first, and one and a half as 1-1/2.`,
      );
    const angle = a.dimension === "angle" && (further || this.rows.some((row) => row.action !== null));
    const action = a.dimension === "torque" ? "torque" : angle ? "angle" : null;
    this.value("min", action, a, low.start, highUnit.typed);
    this.value("max", action, b, high.start, highUnit.typed);
    return null;
  }

  /** The unit of a range as it was typed at one of its ends. */
  unitWord(low: Scanned, high: Scanned): string | null {
    for (const scanned of [high, low]) {
      if (!scanned.unit) continue;
      const tail = /[^\d.,/\s½⅓⅔¼¾⅛⅜⅝⅞][^\d]*[²³]?$/.exec(this.text(scanned.start, scanned.end))?.[0];
      if (tail) return tail.trim();
    }
    return null;
  }

  /** "± 4 Nm", "±5%", "+4/-2": undefined when none of them follows. */
  tolerances(scanned: Scanned, sense: Sense, further: boolean, from: number): Refusal | null | undefined {
    const { s } = this.r;
    const here = this.pos;
    if (this.take(PHRASES.plusMinus)) {
      const band = scanQuantityAt(this.toleranceReading(scanned.unit), this.pos);
      if (!band) return refuse("no-number", this.pos, "Plus or minus how much? Type the number behind ±.");
      if (!band.ok) return band;
      if (band.negative)
        return refuse("negative", band.start, "A tolerance is typed without a sign: ± 4 N·m.");
      this.pos = skip(s, band.end);
      let mainUnit = scanned.unit;
      let mainEnd = scanned.end;
      if (!mainUnit && band.unit && band.unit !== "%") mainUnit = this.plainUnit(band.unit);
      if (!mainUnit) {
        const word = readUnitAt(s, band.end);
        if (word && typeof word.meaning === "string" && band.unit === "%") {
          mainUnit = word.meaning;
          mainEnd = word.end;
          this.pos = skip(s, word.end);
        } else mainUnit = this.unitFor(scanned, further)?.unit ?? null;
      }
      if (!mainUnit) return withoutUnit(this.r, scanned);
      const wanted = this.r.options.dimension;
      if (wanted && dimensionOf(mainUnit) !== wanted && !this.r.also?.includes(dimensionOf(mainUnit)))
        return withoutUnit(this.r, scanned);
      const quantity = settleQuantity(
        this.r,
        scanned,
        mainUnit,
        scanned.unit || mainEnd === scanned.end
          ? this.valueText(scanned, mainUnit, band)
          : `${this.text(scanned.start, scanned.end)} ${mainUnit}`,
      );
      if ("ok" in quantity) return quantity;
      const bandUnit = this.bandUnit(band.unit, mainUnit);
      if (!bandUnit)
        return refuse(
          "wrong-dimension",
          band.start,
          `${this.text(band.start, band.end)} is no tolerance for ${quantity.text}.`,
        );
      const tolerance = settleQuantity(
        this.r,
        band,
        bandUnit,
        band.unit ? undefined : `${this.text(band.start, band.end)} ${bandUnit.replace("Δ", "")}`,
      );
      if ("ok" in tolerance) return tolerance;
      this.place(quantity, this.senseBehind(sense), further, from, true);
      this.value("tolerance", null, tolerance, band.start, true);
      return null;
    }
    if (s[here] !== "+") return undefined;
    return this.plusAndMinus(scanned, here);
  }

  /** "22 +0/-0.05 mm": the value and its two ends; undefined when what follows "+" is no such pair. */
  plusAndMinus(scanned: Scanned, here: number): Refusal | null | undefined {
    const { s } = this.r;
    const reading = this.toleranceReading(scanned.unit);
    const up = scanQuantityAt(reading, here);
    if (!up || !up.ok) return undefined;
    let next = skip(s, up.end);
    if (s[next] === "/" || s[next] === ",") next = skip(s, next + 1);
    if (s[next] !== "-") return undefined;
    const down = scanQuantityAt(reading, next);
    if (!down || !down.ok || !down.negative) return undefined;
    const unit = scanned.unit ?? this.plainUnit(down.unit ?? up.unit);
    if (!unit) return withoutUnit(this.r, scanned);
    for (const band of [up, down])
      if (band.unit && this.plainUnit(band.unit) !== unit)
        return refuse("wrong-dimension", band.start, `Type both ends of the tolerance in ${unit}.`);
    const quantity = settleQuantity(this.r, scanned, unit, this.valueText(scanned, unit, down));
    if ("ok" in quantity) return quantity;
    this.pos = skip(s, down.end);
    this.place(quantity, null, false, scanned.start, true);
    const places = Math.max(scanned.places, up.places, down.places);
    for (const [role, band] of [
      ["min", down],
      ["max", up],
    ] as const) {
      const number = plus(scanned.number, band.number);
      const figure = toNumber(number).toFixed(places);
      const end = settleQuantity(
        this.r,
        {
          ...scanned,
          number,
          places,
          significant: figure.replace(/[-.]/g, "").replace(/^0+/, "").length || 1,
          fraction: false,
          improper: false,
          negative: number.n < 0n,
        },
        unit,
        `${figure} ${unit}`,
      );
      if ("ok" in end) return end;
      this.value(role, quantity.dimension === "torque" ? "torque" : null, end, band.start, true);
    }
    return null;
  }

  toleranceReading(unit: Unit | null): Reading {
    const dimension = unit ? dimensionOf(unit) : this.r.options.dimension;
    const wanted = dimension === "temperature" ? "temperature-difference" : dimension;
    const { dimension: _, ...rest } = this.r.options;
    return {
      ...this.r,
      options: wanted ? { ...rest, dimension: wanted } : rest,
      also: wanted === "temperature-difference" ? ["ratio", "temperature"] : ["ratio"],
    };
  }

  plainUnit(unit: Unit | null): Unit | null {
    if (unit === "Δ°C") return "°C";
    if (unit === "Δ°F") return "°F";
    if (unit === "ΔK") return "K";
    return unit;
  }

  bandUnit(typed: Unit | null, main: Unit): Unit | null {
    const differences: Partial<Record<Unit, Unit>> = { "°C": "Δ°C", "°F": "Δ°F", K: "ΔK" };
    const unit = typed ?? main;
    if (unit === "%") return "%";
    const plain = this.plainUnit(unit) ?? unit;
    if (!sameKind(plain, main)) return null;
    return differences[plain] ?? plain;
  }

  valueText(scanned: Scanned, unit: Unit, band: Scanned): string {
    const figure = this.text(scanned.start, scanned.end);
    if (scanned.unit) return figure;
    return `${figure} ${this.unitWord(scanned, band) ?? unit}`;
  }
}

/** Whether two quantities of one text name the same amount: apart by no more than both are rounded. */
export function agree(a: Quantity, b: Quantity): boolean {
  if (!sameKind(a.unit, b.unit)) return false;
  const other = convertNumber(b.value, b.unit, a.unit);
  const isOffset = a.dimension === "temperature";
  const bStep = isOffset
    ? lastPlace(b) * (b.unit === "°F" ? 5 / 9 : 1) * (a.unit === "°F" ? 9 / 5 : 1)
    : Math.abs(convertNumber(lastPlace(b), b.unit, a.unit));
  const room = isFraction(a) && isFraction(b) ? 0 : (lastPlace(a) + bStep) / 2;
  return Math.abs(a.value - other) <= room + 1e-9 * Math.abs(a.value);
}

/** Drops a value that only says the one before it in another unit; refuses two that disagree. */
function mergeSame(rows: readonly ReadValue[]): ReadValue[] | Refusal {
  const kept: ReadValue[] = [];
  for (const row of rows) {
    const { quantity } = row;
    const before = kept.findLast((r) => r.quantity !== null && r.role === row.role);
    const repeats = row.link === "or" || row.link === "comma";
    const countable =
      quantity && row.role !== "tolerance" && row.action !== "back-off" && row.action !== "wait";
    if (repeats && countable && before?.quantity && sameKind(before.quantity.unit, quantity.unit)) {
      if (agree(before.quantity, quantity) && (row.link === "or" || before.quantity.unit !== quantity.unit))
        continue;
      if (row.link === "or")
        return refuse(
          "disagree",
          row.at,
          `${before.text} and ${row.text} are two different values. Type the one you mean.`,
        );
    }
    kept.push(row);
  }
  return kept;
}

/** Reads values like `readValues`, and says how each was typed. */
export function readTyped(
  text: string,
  options: ReadOptions & { role?: ValueRole } = {},
): { ok: true; values: ReadValue[] } | Refusal {
  const { role, ...reading } = options;
  const r = startReading(text, reading);
  if ("ok" in r) return r;
  const also = reading.dimension === "torque" ? ANGLE_TOO : undefined;
  const reader = new Reader(also ? { ...r, also } : r, role ?? "value");
  const refused = reader.run();
  if (refused) return refused;
  const merged = mergeSame(reader.rows);
  if ("ok" in merged) return merged;

  const dimensions = new Set(
    merged.flatMap((row) =>
      row.quantity && row.role !== "tolerance" && row.action !== "wait" ? [row.quantity.dimension] : [],
    ),
  );
  dimensions.delete("angle");
  const only = [...dimensions];
  const stray = merged.find(
    (row) =>
      row.quantity &&
      row.role !== "tolerance" &&
      row.quantity.dimension !== only[0] &&
      row.quantity.dimension !== "angle" &&
      row.action !== "wait",
  );
  if (only.length > 1 && stray)
    return refuse(
      "disagree",
      stray.at,
      `${stray.text} does not belong to the value before it. Type one value.`,
    );
  const angles = merged.filter((row) => row.quantity?.dimension === "angle" && row.action === null);
  if (only.length === 1 && only[0] !== "torque" && angles[0])
    return refuse(
      "disagree",
      angles[0].at,
      `${angles[0].text} does not belong to the value before it. Type one value.`,
    );

  const torques = merged.filter((row) => row.action === "torque" && row.role === "value");
  const values = merged.map((row) =>
    torques.length > 1 && torques.includes(row) ? { ...row, role: "stage" as const } : row,
  );
  return { ok: true, values };
}

/**
 * Reads everything typed for one mark, in working order: one value, a range ("80-95 Nm"), a tolerance
 * ("88 ± 4 Nm", "88 Nm ±5%"), a limit ("max 9 Nm"), and stages ("20 Nm, 40 Nm, +90°", "loosen, then 20 Nm + 60°",
 * "hand tight + 3/4 turn"). The same value in a second unit ("88 Nm (65 ft-lb)") is one value, and is refused when
 * the two disagree. `role` is given to a plain value (a tool's "size", say) instead of "value". Never throws.
 */
export function readValues(
  text: string,
  options: ReadOptions & { role?: ValueRole } = {},
): { ok: true; values: TypedValue[] } | Refusal {
  const typed = readTyped(text, options);
  if (!typed.ok) return typed;
  return {
    ok: true,
    values: typed.values.map(({ role, action, quantity, text }) => ({ role, action, quantity, text })),
  };
}
