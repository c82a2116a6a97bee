import type { Message } from "./message";

/** Tells a person of a lesson that was assigned. `due` is written out: "Fri 20 Nov 2026". */
export function assignmentMessage(given: {
  to: string;
  name: string;
  lesson: string;
  due: string;
  by: string;
  note: string;
  moved: boolean;
  link: string;
}): Message {
  return {
    to: given.to,
    subject: given.moved
      ? `New due date: ${given.lesson}, ${given.due}`
      : `${given.lesson}: due ${given.due}`,
    text: [
      `Hello ${given.name},`,
      "",
      given.moved
        ? `${given.by} moved the due date of "${given.lesson}" to ${given.due}.`
        : `${given.by} assigned "${given.lesson}" to you, due ${given.due}.`,
      ...(given.note ? ["", given.note] : []),
      "",
      `Watch it and take the quiz: ${given.link}`,
      "",
      "You can turn these mails off in your account.",
      "",
    ].join("\n"),
  };
}
