// Starts the fakes and the application: `--demo` loads the demo shop, `--develop` serves from the sources,
// `--reset` empties the storage first, `--storage DIR` keeps it elsewhere. Ports: PORT, S3_PORT, SMTP_PORT, INBOX_PORT.
import { spawn } from "node:child_process";
import { emptyStorage, startFakes } from "./start-fakes";

const flags = process.argv.slice(2);
const storage = flags.includes("--storage")
  ? (flags[flags.indexOf("--storage") + 1] ?? "storage")
  : "storage";

function port(name: string): number | undefined {
  const text = process.env[name];
  if (text === undefined || text === "") return undefined;
  const number = Number(text);
  if (Number.isInteger(number) && number > 0 && number < 65_536) return number;
  console.error(`${name} is "${text}", which is no port. Use a number from 1 to 65535.`);
  process.exit(1);
}

if (flags.includes("--reset")) emptyStorage(storage);

const [s3, smtp, inbox] = [port("S3_PORT"), port("SMTP_PORT"), port("INBOX_PORT")];
const fakes = await startFakes(storage, {
  application: port("PORT") ?? 3000,
  ...(s3 ? { s3 } : {}),
  ...(smtp ? { smtp } : {}),
  ...(inbox ? { inbox } : {}),
});
const environment = {
  ...process.env,
  ...fakes.env,
  ...(flags.includes("--demo") ? { ALLOW_DEMO_ACCOUNTS: "yes" } : {}),
};

let accounts: readonly string[] = [];
if (flags.includes("--demo")) {
  Object.assign(process.env, environment);
  const { loadDemo } = await import("./demo/load-demo");
  accounts = await loadDemo(Date.now());
}

const [command, args] = flags.includes("--develop")
  ? ["npx", ["react-router", "dev", "--port", fakes.env.PORT ?? "3000"]]
  : [process.execPath, ["build/server/index.js"]];
const application = spawn(command as string, args as string[], { stdio: "inherit", env: environment });

const stop = () => application.kill("SIGTERM");
process.on("SIGINT", stop);
process.on("SIGTERM", stop);
application.on("close", (code) => {
  void fakes.close().then(() => process.exit(code ?? 0));
});

console.log(`
Castlenut:  ${fakes.env.PUBLIC_ORIGIN}
Mail inbox: ${fakes.inboxUrl}
${accounts.length > 0 ? `Accounts:\n${accounts.map((line) => `  ${line}`).join("\n")}\n` : ""}`);
