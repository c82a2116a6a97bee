// What every journey stands on: browser contexts of signed-in people in which a page error or a violation of the
// content security policy fails the test.
import {
  expect,
  test as base,
  type APIResponse,
  type Browser,
  type BrowserContext,
  type BrowserContextOptions,
  type Page,
} from "@playwright/test";
import { ORIGIN } from "./addresses";
import { startShopNetwork, type ShopNetwork } from "./shop-network";

export { expect };

export const PASSWORD = "castlenut-demo";

/** The accounts of the demo shops. */
export const DEMO = {
  owner: "owner@harrowlane.example",
  instructor: "instructor@harrowlane.example",
  dario: "dario@harrowlane.example",
  trainee: "trainee@harrowlane.example",
  ines: "ines@harrowlane.example",
  kofi: "kofi@harrowlane.example",
  ana: "ana@harrowlane.example",
  northgate: "owner@northgate.example",
  northgateTrainee: "trainee@northgate.example",
} as const;

const HEADERS = { Origin: ORIGIN };
type Form = Record<string, string>;

/** A browser of one person. `get`, `post` and `send` share its cookies and never follow a redirect. */
export class Person {
  constructor(
    readonly context: BrowserContext,
    readonly page: Page,
    readonly email: string,
  ) {}

  get(path: string): Promise<APIResponse> {
    return this.context.request.get(path, { maxRedirects: 0 });
  }

  /** A form as the browser posts it from our own page. */
  post(path: string, form: Form): Promise<APIResponse> {
    return this.context.request.post(path, { form, headers: HEADERS, maxRedirects: 0 });
  }

  postMultipart(
    path: string,
    multipart: Record<string, string | { name: string; mimeType: string; buffer: Buffer }>,
  ): Promise<APIResponse> {
    return this.context.request.post(path, { multipart, headers: HEADERS, maxRedirects: 0 });
  }

  /** JSON as the pages send it. */
  send(path: string, data: unknown): Promise<APIResponse> {
    return this.context.request.post(path, { data, headers: HEADERS, maxRedirects: 0 });
  }
}

/** Collects what must not happen in any page of a context. */
function watch(context: BrowserContext, faults: string[]): void {
  context.on("weberror", (error) => faults.push(`page error: ${error.error().message}`));
  context.on("console", (message) => {
    if (message.type() !== "error" && message.type() !== "warning") return;
    if (/content.security.policy|minified react error|hydrat/i.test(message.text()))
      faults.push(`${message.location().url}: ${message.text()}`);
  });
}

type Fixtures = {
  faults: string[];
  /** A network that can be slow and can go away; a browser uses it when its context is opened with `network.proxy`. */
  network: ShopNetwork;
  /** A new browser that nobody is signed in with. */
  somebody: (options?: BrowserContextOptions) => Promise<Person>;
  /** A new browser, signed in. */
  signedIn: (email: string, options?: BrowserContextOptions, password?: string) => Promise<Person>;
};

async function open(browser: Browser, options: BrowserContextOptions): Promise<BrowserContext> {
  return browser.newContext({ baseURL: ORIGIN, ...options });
}

/** Posts the sign-in form of a browser and expects to be let in. */
export async function signIn(person: Person, email: string, password: string = PASSWORD): Promise<void> {
  const answer = await person.post("/sign-in", { email, password });
  expect(answer.status(), `sign-in of ${email}`).toBe(302);
}

export const test = base.extend<Fixtures>({
  faults: [
    // oxlint-disable-next-line no-empty-pattern -- the framework reads the names of the first argument
    async ({}, use) => {
      const faults: string[] = [];
      await use(faults);
      expect(faults, "page errors and violations of the content security policy").toEqual([]);
    },
    { auto: true },
  ],
  // oxlint-disable-next-line no-empty-pattern -- the framework reads the names of the first argument
  network: async ({}, use) => {
    const network = await startShopNetwork();
    await use(network);
    await network.close();
  },
  context: async ({ context, faults }, use) => {
    watch(context, faults);
    await use(context);
  },
  somebody: async ({ browser, faults }, use) => {
    const opened: BrowserContext[] = [];
    await use(async (options = {}) => {
      const context = await open(browser, options);
      watch(context, faults);
      opened.push(context);
      return new Person(context, await context.newPage(), "");
    });
    for (const context of opened) await context.close();
  },
  signedIn: async ({ somebody }, use) => {
    await use(async (email, options = {}, password = PASSWORD) => {
      const { context, page } = await somebody(options);
      const person = new Person(context, page, email);
      await signIn(person, email, password);
      return person;
    });
  },
});
