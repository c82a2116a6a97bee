/** One caption: when it shows, in ms of the recording's file, and its raw text with markup. */
export type Cue = Readonly<{
  startMs: number;
  endMs: number;
  text: string;
  identifier: string;
}>;
