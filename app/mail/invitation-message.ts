import type { Message } from "./message";

export function invitationMessage(given: {
  to: string;
  name: string;
  by: string;
  shop: string;
  role: string;
  link: string;
}): Message {
  return {
    to: given.to,
    subject: `${given.by} invites you to ${given.shop} on Castlenut`,
    text: [
      `Hello ${given.name},`,
      "",
      `${given.by} invites you to train with ${given.shop} as ${given.role === "trainee" ? "a trainee" : `an ${given.role}`}.`,
      "",
      `Accept within 14 days: ${given.link}`,
      "",
    ].join("\n"),
  };
}
