// Plain JavaScript on node: modules alone: this runs before anything is installed.
import { spawn, spawnSync } from "node:child_process";
import { existsSync, readFileSync, statSync } from "node:fs";

const NEEDED_NODE = [20, 19];

/** Programs that Debian packages bring, and the package of each. */
const DEBIAN = { chromium: "chromium", ffmpeg: "ffmpeg", "g++": "g++", make: "make", python3: "python3" };

/** Says what is wrong and how to mend it, then ends. */
function giveUp(sentence) {
  console.error(`\n${sentence}\n`);
  process.exit(1);
}

function has(program) {
  return spawnSync("sh", ["-c", `command -v "${program}"`], { stdio: "ignore" }).status === 0;
}

function run(command, args, options = {}) {
  return new Promise((resolve) => {
    const child = spawn(command, args, { stdio: "inherit", ...options });
    child.on("error", () => resolve(1));
    child.on("close", (code) => resolve(code ?? 1));
  });
}

function checkNode() {
  const [major = 0, minor = 0] = process.versions.node.split(".").map(Number);
  if (major < NEEDED_NODE[0] || (major === NEEDED_NODE[0] && minor < NEEDED_NODE[1]))
    giveUp(
      `Castlenut needs Node ${NEEDED_NODE.join(".")} or newer; this is ${process.versions.node}. Install a newer Node and run the command again.`,
    );
}

async function installDebian(programs) {
  const missing = programs.filter((program) => !has(program));
  if (missing.length === 0) return;
  const packages = missing.map((program) => DEBIAN[program] ?? program).join(" ");
  const how = `apt-get update && apt-get install -y ${packages}`;
  if (!has("apt-get") || process.getuid?.() !== 0)
    giveUp(
      `These programs are missing: ${missing.join(", ")}. Install them and run the command again. On Debian, as root:\n  ${how}`,
    );
  console.log(`Installing Debian packages: ${packages}`);
  const environment = { ...process.env, DEBIAN_FRONTEND: "noninteractive" };
  // The lists of a fresh machine are empty, and old lists name packages that are gone.
  await run("apt-get", ["update", "-qq"], { env: environment, stdio: ["ignore", "ignore", "inherit"] });
  const code = await run(
    "apt-get",
    ["install", "-y", "-qq", "--no-install-recommends", ...packages.split(" ")],
    {
      env: environment,
      stdio: ["ignore", "ignore", "inherit"],
    },
  );
  if (code !== 0)
    giveUp(`Debian packages could not be installed. Install them and run the command again:\n  ${how}`);
}

/** True when node_modules was made from this very lock file, with the native database driver built. */
function packagesAreCurrent() {
  const made = "node_modules/.package-lock.json";
  if (!existsSync(made) || !existsSync("node_modules/better-sqlite3/build/Release/better_sqlite3.node"))
    return false;
  const wanted = JSON.parse(readFileSync("package-lock.json", "utf8")).packages;
  const present = JSON.parse(readFileSync(made, "utf8")).packages;
  return Object.entries(wanted).every(
    ([path, entry]) =>
      path === "" || entry.optional || entry.peer || present[path]?.version === entry.version,
  );
}

async function installPackages() {
  if (packagesAreCurrent()) return;
  if (!has("npm"))
    giveUp("npm is missing. It comes with Node: install Node with npm and run the command again.");
  console.log(
    "Installing npm packages. The database driver is compiled, which takes some minutes on a new machine.",
  );
  if ((await run("npm", ["ci", "--no-audit", "--no-fund"])) !== 0)
    giveUp(
      "npm ci failed. The lines above say why; the registry must be reachable and g++, make and python3 installed.",
    );
}

/** Installs what is missing: npm packages, and the Debian packages that bring these programs. */
export async function prepare(programs) {
  checkNode();
  if (!existsSync("package.json") || !statSync("package.json").isFile())
    giveUp("Run this in the project's top folder, where package.json is.");
  const needsCompiler = !packagesAreCurrent();
  // The compiler first: npm needs it. Browser and converter come beside the npm packages.
  if (needsCompiler) await installDebian(["python3", "make", "g++"]);
  await Promise.all([installPackages(), installDebian(programs)]);
}
