import { useLocation } from "react-router";
import type { Wrong } from "./explain-error";

const TITLES: Readonly<Record<number, string>> = { 403: "Not your job here", 404: "Not here" };

/** What went wrong in plain words, and the way on. It stands inside a page's main part. */
export function WhatWentWrong({ status, sentence }: Wrong) {
  const { pathname, search } = useLocation();
  return (
    <div className="mx-auto grid max-w-xl gap-4 px-6 py-20">
      <div role="alert" className="grid gap-4">
        <h1 className="text-4xl">{TITLES[status] ?? (status < 500 ? "That did not work" : "Our mistake")}</h1>
        <p className="text-lg">{sentence}</p>
      </div>
      <p className="flex flex-wrap gap-x-6">
        {status >= 500 ? (
          <a href={pathname + search} className="inline-flex min-h-11 items-center font-semibold">
            Open this page again
          </a>
        ) : null}
        <a href="/" className="inline-flex min-h-11 items-center font-semibold">
          Go to the library
        </a>
      </p>
    </div>
  );
}

/** The whole page where there is no frame: before sign-in, or nothing at this address. */
export function ErrorPage(wrong: Wrong) {
  return (
    <main>
      <WhatWentWrong {...wrong} />
    </main>
  );
}
