import { createContext, use, useCallback, useState, useSyncExternalStore } from "react";
import { type Jump, type PlayerState, PlayerStore } from "./player-store";

const StoreContext = createContext<PlayerStore | null>(null);

/** Around everything on a page that follows or moves the recording. */
export function PlayerProvider({ startMs, children }: { startMs: number; children: React.ReactNode }) {
  const [store] = useState(() => new PlayerStore(startMs));
  return <StoreContext value={store}>{children}</StoreContext>;
}

export function usePlayerStore(): PlayerStore {
  const store = use(StoreContext);
  if (!store) throw new Error("a player's part stands inside PlayerProvider");
  return store;
}

/** One thing of the player's state; draws again only when that thing changes, so it must be a plain value. */
export function usePlayer<T extends string | number | boolean | null>(select: (state: PlayerState) => T): T {
  const store = usePlayerStore();
  const read = () => select(store.get());
  return useSyncExternalStore(store.subscribe, read, read);
}

export function useJump(): (jump: Jump) => void {
  const store = usePlayerStore();
  return useCallback((jump: Jump) => store.jump(jump), [store]);
}
