import { Form, href, Link, useLocation } from "react-router";
import { can, type Permission } from "~/auth/permissions";
import type { Viewer } from "~/auth/viewer";
import { Brand } from "./brand";
import { SearchBox } from "./search-box";

const PLACES: readonly { to: string; label: string; permission: Permission }[] = [
  { to: "/", label: "Library", permission: "lesson:watch" },
  { to: "/training", label: "My training", permission: "records:own" },
  { to: "/bench", label: "Bench", permission: "lesson:edit" },
  { to: "/skills", label: "Who has shown what", permission: "training:see-all" },
  { to: "/team", label: "Team", permission: "team:see" },
];

/** Pages of who teaches whose addresses begin like those of who learns. */
const TEACHING = /^\/training\/(?:assign|sign-offs|people)(?:\/|$)/;

function isHere(place: string, pathname: string): boolean {
  const at = TEACHING.test(pathname) ? "/skills" : pathname.startsWith("/settings") ? "/team" : pathname;
  return at === place || (place !== "/" && at.startsWith(`${place}/`));
}

function UnitSwitch({ viewer }: { viewer: Viewer }) {
  const { pathname, search } = useLocation();
  const button = (units: "metric" | "inch", label: string) => (
    <button
      name="units"
      value={units}
      aria-pressed={viewer.units === units}
      className={`min-h-11 px-3 text-sm ${viewer.units === units ? "bg-on-graphite font-semibold text-enamel-deep dark:text-graphite" : "text-on-graphite"}`}
    >
      {label}
    </button>
  );
  return (
    <Form
      method="post"
      action={href("/api/units")}
      className="inline-flex overflow-hidden rounded border border-on-graphite-soft"
      aria-label="Which unit comes first"
      preventScrollReset
    >
      <input type="hidden" name="to" value={pathname + search} />
      {button("metric", "N·m")}
      {button("inch", "lbf·ft")}
    </Form>
  );
}

function initials(name: string): string {
  const words = name.trim().split(/\s+/);
  return ((words[0]?.[0] ?? "?") + (words.length > 1 ? (words.at(-1)?.[0] ?? "") : "")).toUpperCase();
}

/** The frame of every signed-in page: brand, search, places by role, units, account. */
export function Frame({ viewer, children }: { viewer: Viewer; children: React.ReactNode }) {
  const { pathname } = useLocation();
  const places = PLACES.filter((place) => can(viewer.role, place.permission));
  return (
    <>
      <a
        href="#content"
        className="sr-only focus:not-sr-only focus:absolute focus:z-50 focus:bg-sheet focus:px-4 focus:py-3"
      >
        Skip to the content
      </a>
      <header className="no-print bg-enamel-deep text-on-graphite">
        <div className="mx-auto flex max-w-[1440px] flex-wrap items-center gap-x-5 gap-y-1.5 px-4 py-2 sm:px-7">
          <Link
            to={href("/")}
            className="inline-flex min-h-11 items-center no-underline"
            aria-label="Castlenut, library"
          >
            <Brand />
          </Link>
          <div className="order-2 w-full lg:order-none lg:w-auto lg:min-w-60 lg:max-w-2xl lg:flex-1">
            <SearchBox />
          </div>
          <div className="ml-auto flex items-center gap-3 xl:order-4 xl:ml-0">
            <UnitSwitch viewer={viewer} />
            <Link
              to={href("/account")}
              aria-label={`Account of ${viewer.name}`}
              className="grid size-11 place-items-center rounded-full bg-brass-tint text-sm font-semibold text-ink no-underline"
            >
              {initials(viewer.name)}
            </Link>
          </div>
          <nav
            aria-label="Places"
            className="order-3 -mx-2 flex w-full flex-wrap gap-x-1 xl:order-3 xl:mx-0 xl:ml-auto xl:w-auto"
          >
            {places.map((place) => (
              <Link
                key={place.to}
                to={place.to}
                aria-current={isHere(place.to, pathname) ? "page" : undefined}
                className="flex min-h-11 items-center rounded px-3 font-semibold whitespace-nowrap text-on-graphite no-underline hover:bg-enamel/60 aria-[current=page]:bg-enamel aria-[current=page]:text-on-enamel"
              >
                {place.label}
              </Link>
            ))}
          </nav>
        </div>
      </header>
      <main id="content" tabIndex={-1} className="outline-none">
        {children}
      </main>
      <footer className="no-print mx-auto max-w-[1440px] px-4 pb-8 text-sm text-ink-soft sm:px-7">
        {viewer.shopName}. Values are the shop's own record: before tightening, compare with the vehicle
        maker's current service information for this chassis number. If they differ, the maker's is right.
      </footer>
    </>
  );
}
