import type { Message } from "./message";

/** Asks somebody who may check to look at a lesson's values. */
export function sendForCheckMessage(given: {
  to: string;
  name: string;
  by: string;
  lesson: string;
  waiting: number;
  link: string;
}): Message {
  const values = given.waiting === 1 ? "1 value waits" : `${given.waiting} values wait`;
  return {
    to: given.to,
    subject: `For check: ${given.lesson}`,
    text: [
      `Hello ${given.name},`,
      "",
      `${given.by} asks you to check "${given.lesson}". ${values} for a second person.`,
      "Take the source to hand: a value is confirmed by reading it there.",
      "",
      `Check: ${given.link}`,
      "",
    ].join("\n"),
  };
}

/** Tells the author that a checker disputes a value. */
export function disputedMessage(given: {
  to: string;
  name: string;
  by: string;
  lesson: string;
  value: string;
  reason: string;
  link: string;
}): Message {
  return {
    to: given.to,
    subject: `Disputed: ${given.value}, ${given.lesson}`,
    text: [
      `Hello ${given.name},`,
      "",
      `${given.by} disputes "${given.value}" in "${given.lesson}".`,
      `Reason: ${given.reason}`,
      "",
      "The lesson is not published again until this is settled: change the value, or have it confirmed.",
      "",
      `Open it: ${given.link}`,
      "",
    ].join("\n"),
  };
}
