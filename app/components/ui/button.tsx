import { Link, type LinkProps } from "react-router";

type Look = "primary" | "ghost" | "quiet";

const LOOKS: Record<Look, string> = {
  primary: "border-enamel bg-enamel text-on-enamel hover:bg-enamel-deep",
  ghost: "border-line-strong bg-transparent text-enamel-text hover:bg-enamel-tint",
  quiet:
    "border-transparent bg-transparent text-enamel-text underline underline-offset-4 hover:bg-enamel-tint",
};

const BASE =
  "inline-flex min-h-11 items-center justify-center gap-2 rounded border px-4 py-2 text-sm font-semibold no-underline disabled:opacity-60";

/** A button that says what it does. One primary a page. */
export function Button({
  look = "primary",
  className = "",
  type = "submit",
  ...rest
}: { look?: Look } & React.ComponentProps<"button">) {
  return <button type={type} className={`${BASE} ${LOOKS[look]} ${className}`} {...rest} />;
}

/** A link that looks like a button. */
export function ButtonLink({
  look = "primary",
  className = "",
  ...rest
}: { look?: Look; className?: string } & LinkProps) {
  return <Link className={`${BASE} ${LOOKS[look]} ${className}`} {...rest} />;
}
