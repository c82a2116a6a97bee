import { z } from "zod";
import { readThread } from "~/quantities/parse";
import type { ReadOptions } from "~/quantities/parse";
import type { TypedValue } from "~/quantities/value";
import { isBushedJoint } from "./component-key";
import { appliesFields, componentLine, readApplies, readSource, sourceFields, wrong } from "./common-fields";
import { asRow, choice, line, tick, typedValues } from "./form-parts";
import { blankContent, type MarkContent } from "./mark-content";

function tightens(values: readonly TypedValue[]): boolean {
  return values.some(
    (value) => value.action === "seat" || value.role === "angle" || value.quantity?.dimension === "torque",
  );
}

const thread = line(60).transform((text, context) => {
  if (text === "") return text;
  const read = readThread(text);
  if (read.ok) return text;
  context.addIssue({ code: "custom", message: read.error });
  return z.NEVER;
});

/** The form of a torque: everything that decides whether the figure holds on the car in front of you. */
export function torqueForm(options: Pick<ReadOptions, "country">) {
  const values = typedValues({ ...options, dimension: "torque" });
  return z
    .object({
      ...appliesFields,
      ...sourceFields,
      component: componentLine("Name the fastener, like “lower link nut to bar”."),
      value: values,
      reusedValue: values,
      thread,
      propertyClass: line(30),
      condition: choice([
        "not-stated",
        "as-supplied",
        "clean-dry",
        "oiled",
        "named-lubricant",
        "named-thread-locker",
        "pre-coated",
      ]),
      conditionDetail: line(100),
      reuse: choice(["not-stated", "replace-always", "reuse", "reuse-if", "measure-and-decide"]),
      reuseDetail: line(200),
      tightenAt: choice(["not-stated", "hanging", "ride-height", "ride-height-by-jack"]),
      runDown: choice(["not-stated", "included", "add-what-the-wrench-shows"]),
      checkAgain: choice(["not-stated", "never", "after-distance", "after-time"]),
      checkAgainDetail: line(120),
      threadDirection: choice(["not-stated", "right", "left"]),
      wheelLoad: choice(["not-stated", "before-weight", "after-weight"]),
      sequence: line(300),
      tightenedState: line(120),
      safetyCritical: tick,
    })
    .transform((form, context) => {
      const all = [...form.value, ...form.reusedValue];
      const byAngle = all.some((value) => value.role === "angle");
      if (form.value.length === 0) wrong(context, "value", "Type the torque with its unit, like 65 ft-lb.");
      else if (!tightens(form.value)) wrong(context, "value", "There is no torque or angle in this.");
      if (form.reusedValue.length > 0 && !tightens(form.reusedValue))
        wrong(context, "reusedValue", "There is no torque or angle in this.");
      if (form.condition === "named-lubricant" && form.conditionDetail === "")
        wrong(context, "conditionDetail", "Name the lubricant.");
      if (form.condition === "named-thread-locker" && form.conditionDetail === "")
        wrong(context, "conditionDetail", "Name the thread locker.");
      if (form.reuse === "reuse-if" && form.reuseDetail === "")
        wrong(context, "reuseDetail", "Write the test that it has to pass.");
      if (form.reuse === "measure-and-decide" && form.reuseDetail === "")
        wrong(context, "reuseDetail", "Write what is measured and the limit.");
      if (form.reuse === "replace-always" && form.reusedValue.length > 0)
        wrong(context, "reusedValue", "A fastener that is always replaced has no value for reuse.");
      if (form.checkAgain === "after-distance" && form.checkAgainDetail === "")
        wrong(context, "checkAgainDetail", "After what distance?");
      if (form.checkAgain === "after-time" && form.checkAgainDetail === "")
        wrong(context, "checkAgainDetail", "After what time?");
      if (byAngle && (form.checkAgain === "after-distance" || form.checkAgain === "after-time"))
        wrong(
          context,
          "checkAgain",
          "A fastener tightened by angle is never pulled again: loosen, replace, start again. Choose “Never”.",
        );
      if (form.tightenAt === "not-stated" && isBushedJoint(form.component))
        wrong(
          context,
          "tightenAt",
          "A rubber-bushed joint tightened hanging winds up at ride height. Say at which height this one is tightened.",
        );
      const content: MarkContent = {
        ...blankContent("torque"),
        component: form.component,
        side: form.side,
        position: form.position,
        applies: readApplies(form, context),
        safetyCritical: form.safetyCritical,
        needs: form.needs,
        note: form.note,
        values: [
          ...form.value.map((value) => asRow(value, form.reusedValue.length > 0 ? "new" : "either")),
          ...form.reusedValue.map((value) => asRow(value, "reused")),
        ],
        thread: form.thread,
        propertyClass: form.propertyClass,
        condition: form.condition,
        conditionDetail: form.conditionDetail,
        reuse: form.reuse,
        reuseDetail: form.reuseDetail,
        tightenAt: form.tightenAt,
        runDown: form.runDown,
        checkAgain: byAngle ? "never" : form.checkAgain,
        checkAgainDetail: form.checkAgainDetail,
        threadDirection: form.threadDirection,
        wheelLoad: form.wheelLoad,
        sequence: form.sequence,
        tightenedState: form.tightenedState,
      };
      return { content, source: readSource(form, context), corrects: null };
    });
}
