import { Form, href, useSearchParams } from "react-router";

/** The one box for values, jobs and moments. Works without JavaScript as a plain form. */
export function SearchBox() {
  const [params] = useSearchParams();
  return (
    <Form action={href("/search")} role="search" className="flex gap-2">
      <label className="sr-only" htmlFor="find">
        Find a value or a job
      </label>
      <input
        id="find"
        name="q"
        type="search"
        defaultValue={params.get("q") ?? ""}
        placeholder="Find a value or a job"
        autoComplete="off"
        className="min-h-11 w-full rounded border border-on-graphite-soft bg-graphite-soft px-3 text-on-graphite placeholder:text-on-graphite-soft"
      />
    </Form>
  );
}
