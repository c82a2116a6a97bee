import { expect, test } from "vitest";
import { blankContent } from "~/lessons/mark-content";
import type { Mark, MarkKind, MarkValue } from "~/lessons/mark";
import { readValues } from "~/quantities/parse";
import { answerScale } from "./answer-scale";
import { answerLine, unitChoices } from "./answer-text";
import { countsAsRight, gradeAnswer } from "./grade-answer";
import { choicesOf, promptOf, questionsOf } from "./questions-of";

let serial = 0;

function rows(text: string, role?: MarkValue["role"]): MarkValue[] {
  const read = readValues(text);
  if (!read.ok) throw new Error(read.error);
  return read.values.map((value) => ({
    role: role ?? value.role,
    action: value.action,
    hardware: "either",
    text: value.text,
    dimension: value.quantity?.dimension ?? null,
    unit: value.quantity?.unit ?? null,
    value: value.quantity?.value ?? null,
    number: value.quantity?.si ?? null,
  }));
}

function mark(
  kind: MarkKind,
  component: string,
  text: string,
  given: Partial<Mark> = {},
  role?: MarkValue["role"],
): Mark {
  serial += 1;
  return {
    ...blankContent(kind),
    id: `mark-${serial}`,
    lessonId: "lesson",
    chapterId: "chapter",
    recordingId: "recording",
    atMs: serial * 1000,
    state: "checked",
    componentKey: "",
    component,
    said: "",
    source: null,
    check: null,
    inkedBy: "",
    values: rows(text, role),
    ...given,
  } as Mark;
}

const lower = mark("torque", "Lower link nut", "65 lbf·ft");
const upper = mark("torque", "Upper link nut", "52 lbf·ft");
const wheel = mark("torque", "Wheel nuts", "45 lbf·ft, 92 lbf·ft");
const idler = mark("torque", "Idler pulley bolt", "22 lbf·ft + 90°");
const socket = mark("tool", "lower link nut", "17 mm", { toolName: "socket" }, "size");
const play = mark("measure", "Ball stud play", "max 0.5 mm");
const seen = mark("measure", "Ball stud play", "1.8 mm", {}, "measured");
const all = [lower, upper, wheel, idler, socket, play, seen];

test("questions read as somebody at the car would ask them", () => {
  expect(promptOf(lower, "Aldren Foss")).toBe("What torque does the lower link nut take on the Aldren Foss?");
  expect(promptOf(wheel, "")).toBe("What torque do the wheel nuts take? Give every stage, in order.");
  expect(promptOf(idler, "")).toBe("What torque does the idler pulley bolt take? Give torque and angle.");
  expect(promptOf(socket, "")).toBe("What size of socket fits the lower link nut?");
  expect(promptOf(play, "")).toBe("What is the most the ball stud play may be?");
});

test("a reading taken from one car is not asked, a limit is", () => {
  const asked = questionsOf(all, [], { vehicle: "", prefer: "inch" }).filter(
    ({ kind }) => kind === "numeric",
  );
  expect(asked.map(({ markId }) => markId)).toEqual(
    [lower, upper, wheel, idler, socket, play].map(({ id }) => id),
  );
});

test("each question takes its own value as right, in the words it was written in", () => {
  for (const question of questionsOf(all, [], { vehicle: "", prefer: "inch" })) {
    const grade = gradeAnswer(question.asked, question.asked.text ?? "");
    expect({ prompt: question.prompt, right: countsAsRight(grade.outcome) }).toEqual({
      prompt: question.prompt,
      right: true,
    });
  }
});

test("no wrong choice is graded as right, and the right one always is", () => {
  const withChoices = questionsOf(all, [], { vehicle: "", prefer: "inch" }).filter(
    ({ choices }) => choices !== null,
  );
  expect(withChoices.length).toBeGreaterThan(2);
  for (const { asked, choices } of withChoices)
    for (const choice of choices ?? []) {
      const { outcome } = gradeAnswer(asked, choice.text);
      expect({ text: choice.text, of: asked.text, right: countsAsRight(outcome) }).toEqual({
        text: choice.text,
        of: asked.text,
        right: choice.why === null,
      });
    }
});

test("a bolt with an angle offers the torque without it", () => {
  const [question] = questionsOf([idler, lower, upper, wheel], [], { vehicle: "", prefer: "inch" }).filter(
    ({ kind, markId }) => kind === "choice" && markId === idler.id,
  );
  const alone = question?.choices?.find(({ text }) => text === "22\u2009lbf·ft");
  expect(alone?.why).toContain("angle is missing");
});

test("a value of a former revision is known as replaced", () => {
  const before = { ...lower, values: rows("60 lbf·ft") };
  const [question] = questionsOf([lower], [before], { vehicle: "", prefer: "inch" });
  expect(question?.asked.superseded).toEqual([{ value: 60, unit: "lbf·ft" }]);
  expect(gradeAnswer(question?.asked ?? { kind: "torque", unit: "N·m" }, "60 lbf·ft").outcome).toBe(
    "superseded",
  );
});

test("a lesson without believable wrong answers asks no choice", () => {
  const lone = mark("measure", "Charging voltage", "13.8 to 14.8 V");
  const asked = questionsOf([lone], [], { vehicle: "", prefer: "inch" });
  expect(asked.map(({ kind }) => kind)).toEqual(["numeric"]);
  expect(choicesOf(lone, asked[0]?.asked ?? { kind: "measure", unit: "V" }, "inch")).toBeNull();
});

test("the chosen unit counts unless the text has one of its own", () => {
  expect(answerLine({ text: "65", unit: "lbf·ft" })).toBe("65 lbf·ft");
  expect(answerLine({ text: "88 Nm", unit: "lbf·ft" })).toBe("88 Nm");
  expect(answerLine({ text: "90", unit: "deg" })).toBe("90 °");
  expect(answerLine({ text: " ", unit: "lbf·ft" })).toBe("");
});

test("units are offered for one figure; stages and angles are typed", () => {
  const [one, , stages] = questionsOf([lower, upper, wheel], [], { vehicle: "", prefer: "inch" }).filter(
    ({ kind }) => kind === "numeric",
  );
  expect(unitChoices(one?.asked ?? { kind: "", unit: "" })).toContain("lbf·in");
  expect(unitChoices(stages?.asked ?? { kind: "", unit: "" })).toEqual([]);
});

test("on the scale a twelfth lies left of the asked value and nothing leaves the drawing", () => {
  const scale = answerScale(
    { kind: "torque", text: "65 lbf·ft", unit: "lbf·ft" },
    { text: "65", unit: "lbf·in" },
  );
  expect(scale?.you.at).toBeLessThan(scale?.asked.from ?? 0);
  for (const at of [
    scale?.you.at,
    scale?.asked.from,
    scale?.asked.to,
    ...(scale?.ticks ?? []).map((tick) => tick.at),
  ]) {
    expect(at).toBeGreaterThanOrEqual(0);
    expect(at).toBeLessThanOrEqual(1);
  }
  expect(
    answerScale({ kind: "torque", text: "65 lbf·ft", unit: "lbf·ft" }, { text: "no idea", unit: "" }),
  ).toBeNull();
});
