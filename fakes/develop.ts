// `npm run dev`: the fakes, and the application from its sources.
process.argv.push("--develop");
process.env.NODE_ENV = "development";
export {};
await import("./start");
