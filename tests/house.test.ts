import { existsSync, readdirSync, readFileSync } from "node:fs";
import { cruise, type ICruiseResult } from "dependency-cruiser";
import { expect, test } from "vitest";
import { can, PERMISSION_WORDS, PERMISSIONS, ROLES } from "~/auth/permissions";

const files = (folder: string) =>
  readdirSync(folder, { recursive: true, encoding: "utf8" })
    .filter((path) => /\.(ts|tsx|mjs)$/.test(path))
    .map((path) => `${folder}/${path}`);
const sources = [...files("app"), ...files("drizzle"), ...files("fakes"), ...files("tests")];
const read = (path: string) => readFileSync(path, "utf8");

// Left to right: a room imports only from rooms to its left (and from the floor, when it is not pure).
const ORDER = [
  ["quantities"],
  ["fasteners", "measuring", "captions"],
  ["vehicles", "recordings"],
  ["lessons"],
  ["reader", "search", "quizzes"],
  ["refresher", "training", "diagnosis"],
  ["publishing", "records"],
];
const FLOOR = ["auth", "shops", "mail", "queue", "forms"];

function forbidden() {
  const rules = ORDER.flatMap((rooms, place) => {
    const right = ORDER.slice(place + 1).flat();
    return rooms.map((room) => ({
      name: `${room} imports only to its left`,
      severity: "error" as const,
      from: { path: `^app/${room}/`, pathNot: "\\.test\\." },
      to: { path: `^app/(${[...right, "doors", "routes", "components"].join("|")})/` },
    }));
  });
  const pure = {
    name: "pure files import no server files",
    severity: "error" as const,
    from: { path: "^app/(?!routes/|doors/)[^/]+/.*\\.tsx?$", pathNot: "\\.(server|test)\\." },
    to: { path: "\\.server\\.tsx?$", dependencyTypesNot: ["type-only" as const] },
  };
  const floor = {
    name: "the floor stands on itself",
    severity: "error" as const,
    from: { path: `^app/(${FLOOR.join("|")})/`, pathNot: "\\.test\\." },
    to: { path: `^app/(?!${FLOOR.join("|")})[^/]+/`, dependencyTypesNot: ["type-only" as const] },
  };
  const components = {
    name: "components import pure files only",
    severity: "error" as const,
    from: { path: "^app/components/", pathNot: "\\.test\\." },
    to: { path: "\\.server\\.tsx?$", dependencyTypesNot: ["type-only" as const] },
  };
  const fakes = {
    name: "the application knows no fakes and no tests",
    severity: "error" as const,
    from: { path: "^app/", pathNot: "\\.test\\." },
    to: { path: "^(fakes|tests)/" },
  };
  const routes = {
    name: "no room imports a route",
    severity: "error" as const,
    from: { path: "^app/(?!routes/)[^/]+/" },
    to: { path: "^app/routes/" },
  };
  return [...rules, pure, floor, components, fakes, routes];
}

test("imports go one way through the house", async () => {
  const { output } = await cruise(["app"], {
    ruleSet: { forbidden: forbidden() },
    validate: true,
    tsPreCompilationDeps: true,
    tsConfig: { fileName: "tsconfig.json" },
    doNotFollow: { path: "node_modules" },
    exclude: { path: "^(node_modules|build|\\.react-router)" },
    enhancedResolveOptions: { extensions: [".ts", ".tsx", ".mjs", ".js"] },
  });
  const { summary } = output as ICruiseResult;
  expect(summary.totalCruised).toBeGreaterThan(100);
  expect(summary.violations.map(({ rule, from, to }) => `${rule.name}: ${from} → ${to}`)).toEqual([]);
});

test("only env.server.ts reads the environment", () => {
  const reading = sources.filter(
    (path) =>
      path.startsWith("app/") &&
      path !== "app/env.server.ts" &&
      !path.includes(".test.") &&
      /process\.env\b/.test(read(path)),
  );
  expect(reading).toEqual([]);
});

test("files are named for their subject", () => {
  const vague = /(^|\/)(utils?|helpers?|misc|common|lib|services?|models?|types?|shared)(\.|\/)/;
  expect(sources.filter((path) => vague.test(path))).toEqual([]);
});

test("no rule is switched off by a comment without saying why, and no test is skipped", () => {
  const off = sources.filter((path) =>
    /@ts-ignore|@ts-nocheck|\b(test|it|describe)\.(skip|only|todo|fixme)\b/.test(
      path === "tests/house.test.ts" ? "" : read(path),
    ),
  );
  expect(off).toEqual([]);
});

test("words the product does not use stand in no page, mail or export", () => {
  const banned = /\b(certified|qualified|competent|guaranteed|job sheet|rub out)\b/i;
  const pages = sources.filter(
    (path) => /^app\/(routes|components|mail)\//.test(path) && !path.includes(".test."),
  );
  const found = pages.flatMap((path) =>
    read(path)
      .split("\n")
      .filter((line) => banned.test(line) && !/^\s*(\/\/|\*|\/\*)/.test(line))
      .map((line) => `${path}: ${line.trim()}`),
  );
  expect(found).toEqual([]);
});

test("no component writes a colour of its own", () => {
  const drawn = sources.filter(
    (path) => /^app\/(components|routes)\//.test(path) && !path.includes(".test."),
  );
  const found = drawn.filter((path) =>
    /#[0-9a-f]{6}\b|\b(?:bg|text|border|fill|stroke)-(?:red|orange|yellow|blue|green|gray|slate|zinc)-\d/i.test(
      read(path).replace(/<meta name="theme-color"[^>]*>/, ""),
    ),
  );
  expect(found).toEqual([]);
});

test("README and DEVELOPERS name only scripts and paths that exist", () => {
  const { scripts } = JSON.parse(read("package.json")) as { scripts: Record<string, string> };
  for (const page of ["README.md", "DEVELOPERS.md"]) {
    const text = read(page);
    for (const [, script = ""] of text.matchAll(/npm run (?:-s )?([a-z:-]+)/g))
      expect(scripts, `${page}: ${script}`).toHaveProperty([script]);
    for (const [, path = ""] of text.matchAll(
      /`((?:app|drizzle|fakes|public|storage|tests|\.ci)\/[\w./-]+)`/g,
    ))
      expect(existsSync(path), `${page}: ${path}`).toBe(true);
  }
});

test("DEVELOPERS prints the rights as they are", () => {
  const rows = PERMISSIONS.map(
    (permission) =>
      `| \`${permission}\` | ${PERMISSION_WORDS[permission]} | ${ROLES.map((role) => (can(role, permission) ? "yes" : "no")).join(" | ")} |`,
  );
  const printed =
    /<!-- rights -->\n(?:.*\n){2}([\s\S]*?)<!-- \/rights -->/.exec(read("DEVELOPERS.md"))?.[1] ?? "";
  expect(printed.trim().split("\n")).toEqual(rows);
});

test("every dependency is imported somewhere", () => {
  const { dependencies, devDependencies } = JSON.parse(read("package.json")) as Record<
    string,
    Record<string, string>
  >;
  // Used by name in a command or a configuration, not by import.
  const byCommand = [
    "drizzle-kit",
    "oxlint",
    "prettier",
    "tsx",
    "typescript",
    "tailwindcss",
    "react-dom",
    "@react-router/node",
  ];
  const configuration = ["vite.config.ts", "vitest.config.ts", "react-router.config.ts", "app/app.css"]
    .map(read)
    .join("\n");
  const all = sources.map(read).join("\n") + configuration;
  const unused = [...Object.keys(dependencies ?? {}), ...Object.keys(devDependencies ?? {})].filter(
    (name) =>
      !byCommand.includes(name) &&
      !name.startsWith("@types/") &&
      !new RegExp(`["']${name.replace(/[/.]/g, "\\$&")}(/[^"']*)?["']`).test(all),
  );
  expect(unused).toEqual([]);
});

test("each migration in the journal stands in the folder, in order", () => {
  const { entries } = JSON.parse(read("drizzle/migrations/meta/_journal.json")) as {
    entries: { idx: number; tag: string }[];
  };
  expect(entries.map(({ idx }) => idx)).toEqual(entries.map((_, n) => n));
  for (const { tag } of entries) expect(existsSync(`drizzle/migrations/${tag}.sql`)).toBe(true);
});
