import { Form, href } from "react-router";
import { Button } from "~/components/ui/button";
import { localTime } from "~/components/ui/local-time";
import { sizeWords } from "~/recordings/limits";
import { useUploads } from "./upload-list";

type Unfinished = Readonly<{ id: string; fileName: string; sizeBytes: number; createdAt: number }>;

/** What this person began to upload before, and how it goes on. Those on their way in this tab stand above. */
export function UnfinishedUploads({
  uploads,
  timeZone,
}: {
  uploads: readonly Unfinished[];
  timeZone: string;
}) {
  const here = new Set(useUploads().map(({ progress }) => progress?.recordingId));
  const left = uploads.filter(({ id }) => !here.has(id));
  if (left.length === 0) return null;
  return (
    <section aria-labelledby="unfinished" className="mt-8 grid grid-cols-1 gap-3">
      <h2 id="unfinished" className="text-lg font-semibold">
        Not finished
      </h2>
      <p className="text-sm">
        Choose the same file again and it goes on where it was. After a week it is cleared away.
      </p>
      <ul aria-labelledby="unfinished" className="rounded-md border border-line bg-sheet">
        {left.map(({ id, fileName, sizeBytes, createdAt }) => (
          <li
            key={id}
            className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-line px-5 py-3 last:border-b-0"
          >
            <div className="min-w-0">
              <p className="font-semibold break-all">{fileName}</p>
              <p className="text-sm text-ink-soft">
                {sizeWords(sizeBytes)}, begun {localTime(createdAt, timeZone)}
              </p>
            </div>
            <Form method="post" action={href("/bench/recordings")}>
              <input type="hidden" name="recording" value={id} />
              <Button name="intent" value="delete" look="quiet" aria-label={`Give up ${fileName}`}>
                Give up
              </Button>
            </Form>
          </li>
        ))}
      </ul>
    </section>
  );
}
