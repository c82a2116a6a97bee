import type { Refusal } from "~/components/ui/field";

/** Fields that few marks need, folded away; open where something stands in them or is wrong. */
export function Rare({
  title,
  names,
  fields,
  refusal,
  children,
}: {
  title: string;
  names: readonly string[];
  fields: Readonly<Record<string, string>>;
  refusal: Refusal;
  children: React.ReactNode;
}) {
  const filled = names.some((name) => {
    const value = refusal?.typed[name] ?? fields[name] ?? "";
    return value !== "" && value !== "not-stated" && value !== "none";
  });
  const wrong = names.some((name) => refusal?.errors[name] !== undefined);
  return (
    <details open={filled || wrong} className="rounded border border-line">
      <summary className="flex min-h-11 cursor-pointer items-center px-4 font-semibold">{title}</summary>
      <div className="grid gap-4 px-4 pt-1 pb-4 sm:grid-cols-2">{children}</div>
    </details>
  );
}
