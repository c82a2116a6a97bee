import { createContext, use, useCallback, useMemo, useRef, useSyncExternalStore } from "react";

/** What a page may ask of the player beside it. Times in ms of lesson time. */
export type Playhead = Readonly<{
  /** Where the video stands; null while nothing is loaded. */
  now: () => number | null;
  seek: (ms: number) => void;
}>;

type Held = Playhead & Readonly<{ hold: (playhead: Playhead | null) => void }>;

const Context = createContext<Held | null>(null);

/** Lets the fields of a page read the moment of the one player in it. */
export function PlayheadProvider({ children }: { children: React.ReactNode }) {
  const held = useRef<Playhead | null>(null);
  const hold = useCallback((playhead: Playhead | null) => {
    held.current = playhead;
  }, []);
  const value = useMemo<Held>(
    () => ({ hold, now: () => held.current?.now() ?? null, seek: (ms) => held.current?.seek(ms) }),
    [hold],
  );
  return <Context value={value}>{children}</Context>;
}

/** The page's playhead; null outside a provider. */
export function usePlayhead(): Held | null {
  return use(Context);
}

const never = () => () => undefined;

/** True once scripts run: what needs them is not shown before. */
export function useScripts(): boolean {
  return useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
}
