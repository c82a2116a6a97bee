import type { Message } from "./message";

/** Tells an instructor that somebody said "This looks wrong". */
export function doubtMessage(given: {
  to: string;
  name: string;
  by: string;
  lesson: string;
  value: string;
  reason: string;
  /** True: an instructor raised it and the value is stopped. */
  stops: boolean;
  link: string;
}): Message {
  return {
    to: given.to,
    subject: `${given.stops ? "Stopped" : "Looks wrong"}: ${given.value}, ${given.lesson}`,
    text: [
      `Hello ${given.name},`,
      "",
      `${given.by} says that "${given.value}" in "${given.lesson}" looks wrong.`,
      `Reason: ${given.reason}`,
      "",
      given.stops
        ? "The value is in doubt: nobody sees its figure until an instructor clears it."
        : "Learners see a warning beside the value. Compare it with the source; stop it or clear it.",
      "",
      `Open it: ${given.link}`,
      "",
    ].join("\n"),
  };
}
