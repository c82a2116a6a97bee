/** One page for everything that went wrong, in plain words. */
export function ErrorPage({ status, sentence }: { status: number; sentence: string }) {
  const title =
    status === 404
      ? "Not here"
      : status === 403
        ? "Not your job here"
        : status < 500
          ? "That did not work"
          : "Our mistake";
  return (
    <main className="mx-auto grid max-w-xl gap-4 px-6 py-20" role="alert">
      <h1 className="text-4xl">{title}</h1>
      <p className="text-lg">{sentence}</p>
      <p>
        <a href="/" className="inline-flex min-h-11 items-center font-semibold">
          Go to the library
        </a>
      </p>
    </main>
  );
}
