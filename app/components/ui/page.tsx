/** The usual page: one heading, what belongs beside it, then the content. */
export function Page({
  title,
  under,
  actions,
  children,
  narrow = false,
}: {
  title: React.ReactNode;
  under?: React.ReactNode;
  actions?: React.ReactNode;
  children: React.ReactNode;
  narrow?: boolean;
}) {
  return (
    <div className={`mx-auto w-full px-4 pt-6 pb-16 sm:px-7 ${narrow ? "max-w-3xl" : "max-w-[1440px]"}`}>
      <header className="mb-5 flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
        <div className="min-w-0">
          <h1 className="text-4xl">{title}</h1>
          {under ? <div className="mt-1 text-sm text-ink-soft">{under}</div> : null}
        </div>
        {actions ? <div className="flex flex-wrap gap-3">{actions}</div> : null}
      </header>
      {children}
    </div>
  );
}

/** A sheet of paper on the bench. */
export function Sheet({ children, className = "" }: { children: React.ReactNode; className?: string }) {
  return <section className={`rounded-md border border-line bg-sheet ${className}`}>{children}</section>;
}

/** Nothing here yet, and the first step out of it. */
export function EmptyState({ title, children }: { title: string; children?: React.ReactNode }) {
  return (
    <div className="rounded-md border border-dashed border-line-strong px-6 py-10 text-center">
      <p className="text-lg font-semibold">{title}</p>
      {children ? <div className="mt-3 grid justify-items-center gap-3 text-ink-soft">{children}</div> : null}
    </div>
  );
}

/** A plain remark with a graphite edge: never a safety colour. */
export function Remark({ children }: { children: React.ReactNode }) {
  return <div className="border-l-4 border-ink bg-sheet px-4 py-3 text-sm">{children}</div>;
}
