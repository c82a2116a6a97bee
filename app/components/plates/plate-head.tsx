import type { Mark } from "~/lessons/mark";
import { appliesWords, placeWords } from "./plate-words";

/** What the plate is about: component, where on the car, what it is narrowed to. */
export function PlateHead({ mark, name }: { mark: Mark; name: string }) {
  const place = placeWords(mark);
  const applies = appliesWords(mark.applies);
  return (
    <div>
      <p className="leading-snug font-semibold">{name}</p>
      {place === "" ? null : <p className="text-sm text-ink-soft">{place}</p>}
      {applies === "" ? null : <p className="text-sm font-semibold">{applies}</p>}
    </div>
  );
}

/** What a kind's own facts do not cover: what the work needs and the note. */
export function MoreFacts({ mark }: { mark: Mark }) {
  return (
    <>
      {mark.needs === "" ? null : (
        <p className="text-sm">
          <strong>Needs:</strong> {mark.needs}
        </p>
      )}
      {mark.note === "" ? null : <p className="text-sm">{mark.note}</p>}
    </>
  );
}
