import { useEffect, useRef } from "react";
import type { PlaybackEngine, PlayedLesson } from "./playback-engine";
import { usePlayer, usePlayerStore } from "./player-context";

declare global {
  interface Window {
    // Read by video.js when it starts: its own style element would be stopped by the content security policy.
    VIDEOJS_NO_DYNAMIC_STYLE?: boolean;
  }
}

/** The moving picture. Fetches the player when it is asked for, never before. */
export function Picture({
  lesson,
  engineRef,
}: {
  lesson: PlayedLesson;
  engineRef: React.RefObject<PlaybackEngine | null>;
}) {
  const store = usePlayerStore();
  const asked = usePlayer((state) => state.phase !== "idle");
  const host = useRef<HTMLDivElement>(null);

  useEffect(() => {
    const place = host.current;
    if (!asked || !place) return;
    let gone = false;
    let remove = () => {};
    window.VIDEOJS_NO_DYNAMIC_STYLE = true;
    Promise.all([
      import("video.js/core"),
      import("./playback-engine"),
      import("video.js/dist/video-js.css"),
    ]).then(
      ([{ default: videojs }, { PlaybackEngine }]) => {
        if (gone) return;
        const element = document.createElement("video-js");
        element.className = "vjs-fill";
        place.append(element);
        const player = videojs(element, {
          controls: false,
          fill: true,
          preload: "metadata",
          playsinline: true,
          errorDisplay: false,
          bigPlayButton: false,
          controlBar: false,
          textTrackSettings: false,
          userActions: { hotkeys: false, click: false, doubleClick: false },
        });
        const engine = new PlaybackEngine(player, lesson, store);
        engineRef.current = engine;
        remove = () => {
          engine.dispose();
          engineRef.current = null;
          player.dispose();
        };
      },
      () =>
        store.set({
          problem: "The player did not load. Reload the page when you have a network.",
          phase: "ready",
        }),
    );
    return () => {
      gone = true;
      remove();
    };
    // One player a lesson: a new revision under the same page starts a new one.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [asked, lesson.lessonId, lesson.revisionId]);

  return <div ref={host} className="absolute inset-0" />;
}
