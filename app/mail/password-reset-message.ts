import type { Message } from "./message";

export function passwordResetMessage(given: { to: string; name: string; link: string }): Message {
  return {
    to: given.to,
    subject: "Choose a new password for Castlenut",
    text: [
      `Hello ${given.name},`,
      "",
      `Choose a new password here, within two hours: ${given.link}`,
      "",
      "The link works once. If you did not ask for it, do nothing: your password stays as it is.",
      "",
    ].join("\n"),
  };
}
