import { Field, Select, type Refusal } from "~/components/ui/field";
import type { ShopDocument } from "~/lessons/documents.server";
import { choices, SOURCE_KIND_WORDS } from "~/lessons/mark-words";
import { Rare } from "./rare";

const NEW = ["newTitle", "newEdition", "newDated"];

function documentWords(document: ShopDocument): string {
  const rest = [document.edition, document.dated].filter((part) => part !== "").join(", ");
  return `${document.title}${rest ? ` (${rest})` : ""}, ${SOURCE_KIND_WORDS[document.kind].toLowerCase()}`;
}

/** Where the value was read: a document of the shop with its place, or a new document. */
export function SourceFields({
  documents,
  fields,
  refusal,
}: {
  documents: readonly ShopDocument[];
  fields: Readonly<Record<string, string>>;
  refusal: Refusal;
}) {
  const fill = (name: string) => ({ name, refusal, defaultValue: fields[name] ?? "" });
  return (
    <fieldset className="grid gap-4 rounded border border-line px-4 pt-2 pb-4">
      <legend className="px-1 font-semibold">Source</legend>
      <Select
        label="Document"
        options={[
          { value: "", label: "No source yet" },
          ...documents.map((document) => ({ value: document.id, label: documentWords(document) })),
          { value: "new", label: "A new document, named below" },
        ]}
        {...fill("documentId")}
      />
      <div className="grid gap-4 sm:grid-cols-2">
        <Field
          label="Page or section"
          hint="As printed, so that a second person finds it."
          {...fill("place")}
        />
        <Field label="Read on" type="date" {...fill("readOn")} />
      </div>
      <Rare title="Add a new document" names={NEW} fields={fields} refusal={refusal}>
        <Select
          label="Kind"
          options={choices(SOURCE_KIND_WORDS)}
          {...fill("newKind")}
          defaultValue={fields["newKind"] ?? "maker"}
        />
        <Field label="Title" hint="“Maker's workshop manual, group 04”" {...fill("newTitle")} />
        <Field label="Edition or number" {...fill("newEdition")} />
        <Field label="Date of the edition" {...fill("newDated")} />
      </Rare>
      <p className="text-sm text-ink-soft">
        Cite the page and figure. Pages of a licensed document are not stored or photographed here.
      </p>
    </fieldset>
  );
}
