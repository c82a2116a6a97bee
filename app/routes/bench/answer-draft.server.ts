import { data } from "react-router";
import { notFound } from "~/auth/require.server";
import { refuse, type FormRefusal } from "~/forms/parse-form";
import { STALE, type DraftRefusal } from "~/lessons/draft-refusal";

/** A form that was not read: 400, with what was typed. */
export function refusedForm(refusal: FormRefusal) {
  return data(refusal, { status: 400 });
}

/** What the bench answers when a change was not made: 404, or the form again with its sentences (409). */
export function refusedDraft(form: FormData, refusal: DraftRefusal) {
  if (refusal.reason === "missing") notFound(refusal.noun);
  return data(refuse(form, refusal.reason === "stale" ? { "": STALE } : { ...refusal.errors }), {
    status: 409,
  });
}
