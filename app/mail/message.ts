/** The words of one mail. */
export type Message = Readonly<{ to: string; subject: string; text: string }>;
