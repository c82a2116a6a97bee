// Every route of the built application, out of the manifest that its own pages load: a new route cannot be forgotten.
import { readdirSync, readFileSync } from "node:fs";

export type BuiltRoute = Readonly<{
  id: string;
  path: string;
  hasAction: boolean;
  hasLoader: boolean;
  inShell: boolean;
}>;

type Manifest = {
  routes: Record<
    string,
    { id: string; parentId?: string; path?: string; index?: boolean; hasAction: boolean; hasLoader: boolean }
  >;
};

export function routesOfBuild(): BuiltRoute[] {
  const folder = "build/client/assets";
  const name = readdirSync(folder).find((file) => /^manifest-.*\.js$/.test(file));
  if (!name) throw new Error("the build has no manifest");
  const script = readFileSync(`${folder}/${name}`, "utf8");
  const { routes } = JSON.parse(script.slice(script.indexOf("{"), script.lastIndexOf("}") + 1)) as Manifest;
  return Object.values(routes)
    .filter(({ id, path, index }) => id !== "root" && (path !== undefined || index === true))
    .map(({ id, parentId, path, hasAction, hasLoader }) => ({
      id,
      path: `/${path ?? ""}`,
      hasAction,
      hasLoader,
      inShell: parentId === "routes/shell",
    }));
}

/** The address of a route with its parameters filled in; throws where one is not given. */
export function fill(path: string, values: Readonly<Record<string, string>>): string {
  return path.replace(/:(\w+)/g, (_, name: string) => {
    const value = values[name];
    if (value === undefined) throw new Error(`no value for :${name} of ${path}`);
    return value;
  });
}
