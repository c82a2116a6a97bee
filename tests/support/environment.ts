/** The environment of unit tests; `given` points to fakes that a test has started. */
export function setTestEnvironment(given: Record<string, string> = {}): void {
  Object.assign(process.env, {
    NODE_ENV: "test",
    PUBLIC_ORIGIN: "http://localhost:3000",
    SESSION_SECRET: "a secret of thirty-two characters or more",
    DATABASE_FILE: ":memory:",
    S3_ENDPOINT: "http://localhost:1",
    S3_PUBLIC_ENDPOINT: "http://localhost:1",
    S3_BUCKET: "films",
    S3_ACCESS_KEY_ID: "id",
    S3_SECRET_ACCESS_KEY: "secret",
    SMTP_URL: "smtp://localhost:1",
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: "true",
    ...given,
  });
}
