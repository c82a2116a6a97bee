import type { Message } from "./message";

/** Tells an instructor that somebody asks for a sign-off. */
export function signOffRequestMessage(given: {
  to: string;
  trainee: string;
  lesson: string;
  doneOn: string;
  note: string;
  link: string;
}): Message {
  return {
    to: given.to,
    subject: `${given.trainee} asks for a sign-off: ${given.lesson}`,
    text: [
      `${given.trainee} did "${given.lesson}" on ${given.doneOn} and asks for a sign-off.`,
      ...(given.note ? ["", `"${given.note}"`] : []),
      "",
      `Answer on your own device: ${given.link}`,
      "",
    ].join("\n"),
  };
}

/** Tells a trainee of a sign-off that was given or taken back. */
export function signOffMessage(given: {
  to: string;
  name: string;
  lesson: string;
  by: string;
  level: string;
  shownOn: string;
  takenBack: string | null;
  link: string;
}): Message {
  return given.takenBack === null
    ? {
        to: given.to,
        subject: `Signed off: ${given.lesson}`,
        text: [
          `Hello ${given.name},`,
          "",
          `${given.by} signed off "${given.lesson}" (${given.level}), shown on ${given.shownOn}.`,
          "",
          `Your record: ${given.link}`,
          "",
        ].join("\n"),
      }
    : {
        to: given.to,
        subject: `Sign-off taken back: ${given.lesson}`,
        text: [
          `Hello ${given.name},`,
          "",
          `${given.by} took back the sign-off of "${given.lesson}" shown on ${given.shownOn}.`,
          `Reason: ${given.takenBack}`,
          "",
          `Your record: ${given.link}`,
          "",
        ].join("\n"),
      };
}
