// `npm run dev`: the fakes, and the application from its sources.
import process from "node:process";

process.argv.push("--develop");
process.env.NODE_ENV = "development";
await import("./start");
