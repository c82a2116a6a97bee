import { data } from "react-router";
import type { Id } from "#drizzle/schema/ids";
import { can, PERMISSION_WORDS, type Permission } from "./permissions";
import type { Scope } from "./scope.server";

const NOUNS = {
  lesson: "That lesson is not in your shop's library.",
  recording: "That recording is not in your shop.",
  captions: "Those captions are not in your shop.",
  chapter: "That chapter is not in this lesson.",
  value: "That value is not in this lesson.",
  document: "That document is not in your shop.",
  vehicle: "That vehicle is not in your shop.",
  quiz: "That quiz is not in your shop.",
  attempt: "That attempt is not yours, or it is gone.",
  assignment: "That assignment is not in your shop.",
  person: "That person is not in your shop.",
  invitation: "That invitation is not in your shop.",
  request: "That request is not in your shop.",
  "sign-off": "That sign-off is not in your shop.",
  task: "That background task is not in your shop.",
  session: "That device is not signed in.",
  page: "There is no page at this address.",
} as const;

/** Missing and not-yours look the same from outside: 404 with a sentence. */
export function notFound(noun: keyof typeof NOUNS): never {
  throw data(NOUNS[noun], { status: 404 });
}

/** Yours, but not your job: 403. */
export function requirePermission(scope: Scope, permission: Permission): void {
  if (!can(scope.role, permission))
    throw data(`Your role does not let you ${PERMISSION_WORDS[permission]}. Ask the shop's owner.`, {
      status: 403,
    });
}

/** An id out of an address. What cannot be an id is a missing thing, never a query. */
export function readId<Noun extends string>(text: string | undefined, noun: keyof typeof NOUNS): Id<Noun> {
  if (text === undefined || !/^[0-9A-HJKMNP-TV-Z]{26}$/.test(text)) notFound(noun);
  return text as Id<Noun>;
}
