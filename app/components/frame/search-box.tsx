import { useEffect, useId, useRef, useState } from "react";
import { Form, href, useNavigate, useSearchParams } from "react-router";
import type { FoundJson } from "~/search/found-json";
import { momentParam } from "~/lessons/timecode";

type Suggestion = Readonly<{ to: string; words: string; under: string }>;

const WAIT_MS = 150;

function suggestionsOf(found: FoundJson): Suggestion[] {
  const values = found.answers.slice(0, 5).map((answer) => ({
    to: `/lessons/${answer.lessonId}?t=${momentParam(answer.atMs)}`,
    words: [answer.component, answer.text].filter(Boolean).join(": "),
    under: [answer.warning, answer.vehicle, answer.lessonTitle].filter(Boolean).join(" · "),
  }));
  const lessons = found.lessons.slice(0, 3).map((lesson) => ({
    to: `/lessons/${lesson.lessonId}`,
    words: lesson.lessonTitle,
    under: `Lesson · ${lesson.vehicle}`,
  }));
  return [...values, ...lessons];
}

/** "/" jumps into the box, but never while somebody types elsewhere. */
function useSlash(input: React.RefObject<HTMLInputElement | null>) {
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      const target = event.target instanceof HTMLElement ? event.target : null;
      if (event.key !== "/" || event.ctrlKey || event.metaKey || event.altKey) return;
      if (target?.closest("input, textarea, select, [contenteditable]")) return;
      event.preventDefault();
      input.current?.focus();
    };
    document.addEventListener("keydown", onKey);
    return () => document.removeEventListener("keydown", onKey);
  }, [input]);
}

/**
 * The one box for values, jobs and moments: a plain form without JavaScript, and with it a combobox after the ARIA
 * pattern, whose suggestions come from the shop's own index while typing.
 */
export function SearchBox() {
  const [params] = useSearchParams();
  const navigate = useNavigate();
  const listId = useId();
  const input = useRef<HTMLInputElement>(null);
  const waiting = useRef<{ timer?: ReturnType<typeof setTimeout>; request?: AbortController }>({});
  const [suggestions, setSuggestions] = useState<readonly Suggestion[]>([]);
  const [active, setActive] = useState(-1);
  const open = suggestions.length > 0;
  useSlash(input);

  const close = () => {
    clearTimeout(waiting.current.timer);
    waiting.current.request?.abort();
    setSuggestions([]);
    setActive(-1);
  };

  const ask = (text: string) => {
    clearTimeout(waiting.current.timer);
    waiting.current.request?.abort();
    if (text.trim().length < 2) return close();
    waiting.current.timer = setTimeout(() => {
      const request = new AbortController();
      waiting.current.request = request;
      fetch(`${href("/api/search")}?limit=5&q=${encodeURIComponent(text)}`, { signal: request.signal })
        .then((response) => (response.ok ? (response.json() as Promise<FoundJson>) : null))
        .then((found) => {
          if (!found || document.activeElement !== input.current) return;
          setSuggestions(suggestionsOf(found));
          setActive(-1);
        })
        .catch(() => {
          // Typed on, or no network: the form itself still works.
        });
    }, WAIT_MS);
  };

  const go = (suggestion: Suggestion) => {
    close();
    void navigate(suggestion.to);
  };

  const onKeyDown = (event: React.KeyboardEvent) => {
    const chosen = suggestions[active];
    if (event.key === "Escape" && open) {
      event.preventDefault();
      close();
    } else if ((event.key === "ArrowDown" || event.key === "ArrowUp") && open) {
      event.preventDefault();
      const step = event.key === "ArrowDown" ? 1 : -1;
      setActive((at) => {
        const next = at + step;
        return next < -1 ? suggestions.length - 1 : next >= suggestions.length ? -1 : next;
      });
    } else if (event.key === "Enter" && chosen) {
      event.preventDefault();
      go(chosen);
    }
  };

  return (
    <Form action={href("/search")} role="search" className="relative" onSubmit={close}>
      <label className="sr-only" htmlFor="find">
        Find a value or a job
      </label>
      <input
        ref={input}
        id="find"
        key={params.get("q") ?? ""}
        name="q"
        type="search"
        role="combobox"
        aria-expanded={open}
        aria-controls={listId}
        aria-autocomplete="list"
        {...(active >= 0 ? { "aria-activedescendant": `${listId}-${active}` } : {})}
        aria-keyshortcuts="/"
        defaultValue={params.get("q") ?? ""}
        placeholder="Find a value or a job"
        autoComplete="off"
        maxLength={300}
        onChange={(event) => ask(event.target.value)}
        onKeyDown={onKeyDown}
        onBlur={close}
        className="min-h-11 w-full rounded border border-on-graphite-soft bg-graphite-soft px-3 text-on-graphite placeholder:text-on-graphite-soft"
      />
      <ul
        id={listId}
        role="listbox"
        aria-label="Suggestions"
        hidden={!open}
        className="absolute inset-x-0 top-full z-40 mt-1 max-h-96 overflow-y-auto rounded border border-line-strong bg-sheet text-ink shadow-lg"
      >
        {suggestions.map((suggestion, n) => (
          // The keyboard moves through the list from the input, as the pattern wants it.
          // oxlint-disable-next-line jsx-a11y/click-events-have-key-events
          <li
            key={suggestion.to + suggestion.words}
            id={`${listId}-${n}`}
            role="option"
            aria-selected={n === active}
            tabIndex={-1}
            onPointerDown={(event) => event.preventDefault()}
            onClick={() => go(suggestion)}
            className={`min-h-11 cursor-pointer px-4 py-2 ${n === active ? "bg-enamel-tint outline-2 -outline-offset-2 outline-brass" : ""}`}
          >
            {suggestion.words}
            <span className="block text-sm text-ink-soft">{suggestion.under}</span>
          </li>
        ))}
      </ul>
      <p role="status" className="sr-only">
        {open ? `${suggestions.length} suggestions` : ""}
      </p>
    </Form>
  );
}
