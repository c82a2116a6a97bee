import { createHash } from "node:crypto";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { createRequire } from "node:module";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { chromium } from "@playwright/test";
import { TONE, type Scene } from "./scenes/paint";

export const FRAMES_A_SECOND = 12;
export const SIZE = { width: 1280, height: 720 } as const;

const face = (family: string, weight: number, file: string): string => {
  const data = readFileSync(createRequire(import.meta.url).resolve(file)).toString("base64");
  return `@font-face{font-family:"${family}";font-weight:${weight};src:url(data:font/woff2;base64,${data})}`;
};

const page = (): string =>
  `<style>${face("Barlow Condensed", 600, "@fontsource/barlow-condensed/files/barlow-condensed-latin-600-normal.woff2")}` +
  `${face("Inter", 400, "@fontsource/inter/files/inter-latin-400-normal.woff2")}` +
  `body{margin:0;background:${TONE.ground}} .figure{font:600 1px "Barlow Condensed"} .text{font:400 1px Inter}` +
  `svg{display:block} text{font-size:inherit}</style><div id="frame"></div>`;

/** The whole frame: chapter and house lettering around the scene. */
export function frame(scene: Scene, t: number, chapter: string): string {
  const title = chapter.replace(/&/g, "&amp;").replace(/</g, "&lt;");
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" width="${SIZE.width}" height="${SIZE.height}" viewBox="0 0 1280 720">` +
    `<rect width="1280" height="720" fill="${TONE.ground}"/>` +
    scene.draw(t) +
    `<rect x="40" y="34" width="6" height="40" fill="${TONE.brass}"/>` +
    `<text x="62" y="68" font-size="42" fill="${TONE.paper}" style="font:600 42px 'Barlow Condensed'">${title}</text>` +
    `<text x="1240" y="62" text-anchor="end" fill="${TONE.soft}" style="font:600 24px 'Barlow Condensed'">Harrow Lane Garage</text>` +
    `</svg>`
  ).replace(
    /font-size="(\d+)"([^>]*)class="(figure|text)"/g,
    (_, size: string, between: string, kind: string) =>
      `${between} style="font:${kind === "figure" ? `600 ${size}px 'Barlow Condensed'` : `400 ${size}px Inter`}"`,
  );
}

/** Turns frames into PNG in a browser; a frame that was drawn before is not drawn again. */
export async function openDrawing(executablePath = "/usr/bin/chromium") {
  const profile = mkdtempSync(join(tmpdir(), "frames-"));
  const quiet = ["disable-gpu", "disable-quic", "no-first-run", "disable-background-networking"];
  const context = await chromium.launchPersistentContext(profile, {
    executablePath,
    headless: true,
    viewport: SIZE,
    args: ["--no-sandbox", ...quiet.map((a) => `--${a}`), "--disable-component-update", "--disable-sync"],
  });
  const tab = context.pages()[0] ?? (await context.newPage());
  await tab.setContent(page());
  await tab.evaluate(() =>
    Promise.all([document.fonts.load("600 20px 'Barlow Condensed'"), document.fonts.load("400 20px Inter")]),
  );
  const drawn = new Map<string, Buffer>();
  return {
    png: async (svg: string): Promise<Buffer> => {
      const key = createHash("sha256").update(svg).digest("hex");
      const known = drawn.get(key);
      if (known) return known;
      await tab.evaluate((markup) => {
        document.querySelector("#frame")!.innerHTML = markup;
      }, svg);
      const png = await tab.screenshot({ type: "png" });
      drawn.set(key, png);
      return png;
    },
    close: async () => {
      await context.close();
      rmSync(profile, { recursive: true, force: true });
    },
  };
}
