import { href } from "react-router";
import type { Place } from "~/publishing/gate";

/** The address where a line of the publish gate is put right. */
export function placeHref(lessonId: string, where: Place): string {
  const bench = href("/bench/lessons/:lessonId", { lessonId });
  switch (where.kind) {
    case "mark":
      return href("/bench/lessons/:lessonId/marks/:markId", { lessonId, markId: where.id });
    case "chapter":
      return `${bench}#chapter-${where.id}`;
    case "captions":
      return `${href("/bench/lessons/:lessonId/captions", { lessonId })}#${where.id}`;
    case "check":
      return `${href("/bench/lessons/:lessonId/check", { lessonId })}#${where.id}`;
    case "new-caution":
      return `${href("/bench/lessons/:lessonId/marks/new", { lessonId })}?kind=caution`;
    case "recording":
    case "lesson":
      return bench;
    default:
      return where satisfies never;
  }
}

/** What the link at the end of a line says. */
export function placeWords(where: Place): string {
  switch (where.kind) {
    case "mark":
      return "Open the mark";
    case "chapter":
      return "Go to the chapter";
    case "captions":
      return "Import captions";
    case "check":
      return "Check values";
    case "new-caution":
      return "Write the caution";
    case "recording":
      return "Go to the recording";
    case "lesson":
      return "Go to the bench";
    default:
      return where satisfies never;
  }
}
