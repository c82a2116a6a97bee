/** The server or the storage has said no: trying again changes nothing. The message is for the person. */
export class Refused extends Error {}

/** It did not work this time and is tried again. The message is for the person. */
export class NotNow extends Error {}

export const NO_NETWORK = "No network. It goes on by itself when the network is back.";
const NO_ANSWER = "No answer. It is tried again by itself until there is one.";
export const FAULT = "The server or the storage has a fault. It is tried again by itself.";
const SIGNED_OUT = "You are signed out. Sign in in another tab; then it goes on by itself.";

/** Closing a large upload may take storage a while. */
const ANSWER_MS = 120_000;

/** While a part moves, something is heard of it at least this often; else the connection is dead. */
const SILENCE_MS = 60_000;

function unanswered(): NotNow {
  return new NotNow(navigator.onLine ? NO_ANSWER : NO_NETWORK);
}

/** Posts JSON to our own server. A 409 is an answer; every other refusal throws. */
export async function ask<T>(path: string, body: unknown): Promise<T> {
  let response: Response;
  try {
    response = await fetch(path, {
      method: "POST",
      headers: { "Content-Type": "application/json" },
      body: JSON.stringify(body),
      signal: AbortSignal.timeout(ANSWER_MS),
    });
  } catch {
    throw unanswered();
  }
  if (response.status === 401) throw new NotNow(SIGNED_OUT);
  if (response.status === 429 || response.status >= 500) throw new NotNow(FAULT);
  const said = await response.text().catch(() => "");
  let answer: (T & { error?: string }) | null = null;
  try {
    answer = JSON.parse(said) as T & { error?: string };
  } catch {
    // Not ours: a refusal in plain words, or a page of something in between.
  }
  if (answer && (response.ok || response.status === 409)) return answer;
  if (response.ok) throw new NotNow(FAULT);
  throw new Refused(
    answer?.error ?? (said.length > 0 && said.length < 300 ? said : "The upload was refused."),
  );
}

/** A part on its way to storage. */
export type Sending = Readonly<{ arrived: Promise<void>; stop: () => void }>;

/** Puts a part into storage under a signed link. Silence for a minute stops it. */
export function putPart(url: string, body: Blob, onSent: (bytes: number) => void): Sending {
  const request = new XMLHttpRequest();
  let silence: ReturnType<typeof setTimeout> | undefined;
  const heard = () => {
    clearTimeout(silence);
    silence = setTimeout(() => request.abort(), SILENCE_MS);
  };
  const arrived = new Promise<void>((resolve, reject) => {
    request.open("PUT", url);
    request.upload.onprogress = (event) => {
      heard();
      onSent(event.loaded);
    };
    request.onload = () => (request.status === 200 ? resolve() : reject(new NotNow(FAULT)));
    request.onerror = () => reject(unanswered());
    request.onabort = () => reject(unanswered());
    request.onloadend = () => clearTimeout(silence);
    heard();
    request.send(body);
  });
  return { arrived, stop: () => request.abort() };
}
