import { useEffect, useRef } from "react";
import { formatTimecode } from "~/lessons/timecode";
import { useJump, usePlayer } from "./player-context";

type SaidLine = Readonly<{ atMs: number; endMs: number; text: string; correction: string }>;

/** Who has scrolled the list reads; it does not move under their eyes for so long. */
const LEFT_ALONE_MS = 6_000;

/** The line that is being said: the last one that has begun. */
function lineAt(lines: readonly SaidLine[], momentMs: number): number {
  let [low, high] = [0, lines.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((lines[middle] as SaidLine).atMs <= momentMs) low = middle + 1;
    else high = middle;
  }
  return low - 1;
}

/** What is said, as text that follows the recording and jumps in it. */
export function SaidList({ lines }: { lines: readonly SaidLine[] }) {
  const jump = useJump();
  const current = usePlayer((state) => lineAt(lines, state.momentMs));
  const playing = usePlayer((state) => state.playing);
  const list = useRef<HTMLOListElement>(null);
  const touched = useRef(0);
  useEffect(() => {
    const box = list.current;
    const line = box?.children[current];
    if (!box || !(line instanceof HTMLElement) || !playing) return;
    if (performance.now() - touched.current < LEFT_ALONE_MS) return;
    // Only the list scrolls, never the page.
    box.scrollTop = line.offsetTop - box.clientHeight / 3;
  }, [current, playing]);
  useEffect(() => {
    const box = list.current;
    if (!box) return;
    const touch = () => {
      touched.current = performance.now();
    };
    const signs = ["wheel", "touchmove", "keydown"] as const;
    for (const sign of signs) box.addEventListener(sign, touch, { passive: true });
    return () => {
      for (const sign of signs) box.removeEventListener(sign, touch);
    };
  }, []);
  return (
    <ol ref={list} aria-label="What is said" className="relative max-h-72 overflow-y-auto overscroll-contain">
      {lines.map((line, index) => (
        <li key={`${line.atMs}-${index}`}>
          <button
            type="button"
            aria-current={index === current ? "true" : undefined}
            onClick={() => jump({ toMs: line.atMs, play: true })}
            className="flex min-h-11 w-full gap-3 rounded px-2 py-1.5 text-left hover:bg-enamel-tint aria-[current=true]:bg-brass-tint lg:min-h-8"
          >
            <span className="w-12 shrink-0 text-sm text-ink-soft">{formatTimecode(line.atMs)}</span>
            <span>
              {line.text}
              {line.correction === "" ? null : (
                <span className="block font-semibold">Corrected: {line.correction}</span>
              )}
            </span>
          </button>
        </li>
      ))}
    </ol>
  );
}
