import { Brand } from "./brand";

/** Pages before sign-in: the brand, what it is, and one form. */
export function Door({
  title,
  children,
  foot,
}: {
  title: string;
  children: React.ReactNode;
  foot?: React.ReactNode;
}) {
  return (
    <div className="grid min-h-dvh content-start lg:grid-cols-[minmax(0,5fr)_minmax(0,7fr)] lg:content-stretch">
      <header className="bg-enamel-deep px-6 py-6 text-on-graphite lg:px-12 lg:py-16">
        <Brand />
        <p className="mt-3 max-w-md text-sm lg:hidden">
          A shop's own recordings turned into training: every value with its source, checked by a second
          person.
        </p>
        <p className="mt-4 hidden max-w-md text-lg lg:block">
          A shop films its own jobs. Castlenut turns them into training that can be trusted at the car: every
          torque, tool size, measurement and caution at its second of video, with its source, checked by a
          second person.
        </p>
      </header>
      <main className="grid content-start px-6 py-10 lg:content-center lg:px-16">
        <div className="w-full max-w-md">
          <h1 className="mb-6 text-4xl">{title}</h1>
          {children}
          {foot ? <div className="mt-6 grid gap-2 text-sm">{foot}</div> : null}
        </div>
      </main>
    </div>
  );
}
