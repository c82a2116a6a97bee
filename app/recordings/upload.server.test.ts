import { execFileSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync, truncateSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import {
  CompleteMultipartUploadCommand,
  GetObjectCommand,
  HeadObjectCommand,
  PutObjectCommand,
} from "@aws-sdk/client-s3";
import { eq } from "drizzle-orm";
import { afterAll, beforeAll, expect, test } from "vitest";
import type { Scope, ShopScope } from "~/auth/scope.server";
import { runNextTask } from "~/queue/run-tasks.server";
import { taskHandlers } from "~/background.server";
import { env } from "~/env.server";
import { recordings, tasks } from "#drizzle/schema/index";
import { startFakeS3, type FakeS3 } from "../../fakes/s3/start-fake-s3";
import { aDatabase, aLesson, aRecording, aScope, aShop, NOON } from "../../tests/support/factories";
import { setTestEnvironment } from "../../tests/support/environment";
import { aPublishedLesson } from "../../tests/support/published-lesson";
import { checkRecording } from "./check-recording.server";
import { convertRecording } from "./convert-recording.server";
import { deleteRecording } from "./delete-recording.server";
import { listRecordings, unfinishedUploads } from "./list-recordings.server";
import { keepPictures } from "./keep-pictures.server";
import { objectStorage } from "./object-storage.server";
import { pictureLink, playbackLink } from "./playback-link.server";
import { madeKey } from "./object-key";
import { readPeaks, soundPeaks } from "./sound-peaks";
import { abortStoredUpload, storedParts, storedSize } from "./stored-files.server";
import { beginUpload, cancelUpload, completeUpload, signParts, uploadState } from "./upload.server";

const folder = mkdtempSync(join(tmpdir(), "upload-"));
let fake: FakeS3;

function film(name: string, ...args: string[]): string {
  const file = join(folder, name);
  const picture = ["-f", "lavfi", "-i", "testsrc2=s=320x180:r=12:d=4", "-f", "lavfi", "-i", "sine=f=440:d=4"];
  execFileSync("ffmpeg", ["-nostdin", "-loglevel", "error", "-y", ...picture, ...args, file]);
  return file;
}

let good: string;

beforeAll(async () => {
  fake = await startFakeS3({
    root: join(folder, "objects"),
    port: 0,
    accessKeyId: "id",
    secretAccessKey: "secret",
    origins: ["*"],
    buckets: ["films"],
  });
  setTestEnvironment({ S3_ENDPOINT: fake.url, S3_PUBLIC_ENDPOINT: fake.url });
  good = film("good.mp4", "-c:v", "libx264", "-pix_fmt", "yuv420p", "-c:a", "aac", "-movflags", "+faststart");
}, 60_000);

afterAll(async () => {
  await fake.close();
  rmSync(folder, { recursive: true, force: true });
});

function aBench() {
  const db = aDatabase();
  const shopId = aShop(db);
  return {
    db,
    shopId,
    marta: aScope(db, shopId, "instructor"),
    dario: aScope(db, shopId, "instructor"),
    tom: aScope(db, shopId, "trainee"),
  };
}

/** Sends a file as the browser does: begin, sign, put, complete. */
async function send(scope: Scope, file: string, fileName = "film.mp4", declared?: number) {
  const body = readFileSync(file);
  const plan = await beginUpload(
    scope,
    { fileName, sizeBytes: declared ?? body.length, lastModified: 1 },
    NOON,
  );
  if (!plan.ok) throw new Error(plan.sentence);
  const signed = await signParts(scope, plan.recordingId, [1]);
  if (!signed.ok) throw new Error(signed.sentence);
  expect((await fetch(signed.urls[1] ?? "", { method: "PUT", body })).status).toBe(200);
  return plan.recordingId;
}

/** Does every task that is due, light ones first, as the queue does. */
async function work(scope: Scope): Promise<void> {
  const clock = () => NOON;
  while (await runNextTask(scope.db, taskHandlers, clock, "light"));
  while (await runNextTask(scope.db, taskHandlers, clock, "heavy"));
}

const find = (scope: Scope, id: string) =>
  scope.db
    .select()
    .from(recordings)
    .all()
    .find((row) => row.id === id);

test("a recording goes up, is checked by its contents and gets poster, storyboard and peaks", async () => {
  const { marta, db } = aBench();
  const id = await send(marta, good);
  expect(await completeUpload(marta, id, NOON)).toEqual({ ok: true });
  expect(await completeUpload(marta, id, NOON)).toEqual({ ok: true });
  expect(db.select().from(tasks).where(eq(tasks.kind, "check-recording")).all()).toHaveLength(1);
  await work(marta);
  const row = find(marta, id);
  expect(row).toMatchObject({
    state: "ready",
    container: "mp4",
    videoCodec: "avc",
    audioCodec: "aac",
    width: 320,
    height: 180,
  });
  expect(Math.abs((row?.durationMs ?? 0) - 4000)).toBeLessThan(100);
  expect(Math.max(...readPeaks(row?.peaks ?? null))).toBeGreaterThan(10);
  for (const what of ["poster", "storyboard"] as const) {
    const link = await pictureLink(marta, id, what, NOON);
    const picture = new Uint8Array(await (await fetch(link?.url ?? "")).arrayBuffer());
    // A JPEG file begins with FF D8 FF (ITU-T T.81, SOI marker).
    expect([...picture.subarray(0, 3)]).toEqual([0xff, 0xd8, 0xff]);
  }
  const link = await playbackLink(marta, id, NOON);
  const part = await fetch(link?.url ?? "", { headers: { range: "bytes=4-7" } });
  expect([part.status, part.headers.get("content-type"), await part.text()]).toEqual([
    206,
    "video/mp4",
    "ftyp",
  ]);
  expect(link?.expiresAt).toBe(NOON + 15 * 60_000);
}, 60_000);

test("the same file chosen again goes on where it was, for the same person only", async () => {
  const { marta, dario } = aBench();
  const order = { fileName: "long.mp4", sizeBytes: 40 * 1024 * 1024, lastModified: 7 };
  const first = await beginUpload(marta, order, NOON);
  if (!first.ok) throw new Error(first.sentence);
  const signed = await signParts(marta, first.recordingId, [2]);
  if (!signed.ok) throw new Error(signed.sentence);
  await fetch(signed.urls[2] ?? "", { method: "PUT", body: new Uint8Array(first.partBytes) });
  const again = await beginUpload(marta, order, NOON + 1000);
  expect(again).toMatchObject({
    ok: true,
    recordingId: first.recordingId,
    partBytes: 16 * 1024 * 1024,
    done: [2],
  });
  const other = await beginUpload(dario, order, NOON);
  expect(other.ok && other.recordingId).not.toBe(first.recordingId);
  expect(await uploadState(dario, first.recordingId)).toMatchObject({ ok: false, status: 404 });
  expect(await signParts(dario, first.recordingId, [1])).toMatchObject({ ok: false, status: 404 });
  expect(await completeUpload(marta, first.recordingId, NOON)).toMatchObject({
    ok: false,
    status: 409,
    missing: [1, 3],
  });
  expect(find(marta, first.recordingId)?.state).toBe("uploading");
});

test("a part that arrived short counts as missing", async () => {
  const { marta } = aBench();
  const id = await send(marta, good, "short.mp4", readFileSync(good).length + 1000);
  expect(await completeUpload(marta, id, NOON)).toMatchObject({ ok: false, missing: [1] });
});

test("only parts that the file has are signed, and nothing of another shop is touched", async () => {
  const { db, marta } = aBench();
  const plan = await beginUpload(marta, { fileName: "a.mp4", sizeBytes: 100, lastModified: 1 }, NOON);
  if (!plan.ok) throw new Error(plan.sentence);
  expect(await signParts(marta, plan.recordingId, [2])).toMatchObject({ ok: false, status: 422 });
  const stranger = aScope(db, aShop(db), "owner");
  for (const result of [
    await signParts(stranger, plan.recordingId, [1]),
    await completeUpload(stranger, plan.recordingId, NOON),
    cancelUpload(stranger, plan.recordingId, NOON),
    await uploadState(stranger, plan.recordingId),
  ])
    expect(result).toMatchObject({ ok: false, status: 404 });
  expect(deleteRecording(stranger, plan.recordingId, NOON)).toEqual({ ok: false, reason: "missing" });
  expect(await playbackLink(stranger, plan.recordingId, NOON)).toBeNull();
  expect(listRecordings(stranger)).toEqual([]);
});

test("an empty file and one over 8 GB are refused before anything is stored", async () => {
  const { marta, db } = aBench();
  expect(await beginUpload(marta, { fileName: "a.mp4", sizeBytes: 0, lastModified: 1 }, NOON)).toMatchObject({
    ok: false,
    status: 422,
  });
  expect(
    await beginUpload(marta, { fileName: "a.mp4", sizeBytes: 9e9, lastModified: 1 }, NOON),
  ).toMatchObject({ ok: false, status: 422 });
  expect(db.select().from(recordings).all()).toEqual([]);
});

test("a text renamed to .mp4 and a file that was cut off are refused by their contents and leave storage", async () => {
  const { marta } = aBench();
  const text = join(folder, "text.mp4");
  writeFileSync(text, "this is not a video\n".repeat(500));
  const cut = join(folder, "cut.mp4");
  writeFileSync(cut, readFileSync(good));
  truncateSync(cut, Math.floor(readFileSync(good).length * 0.5));
  const sound = film("sound.mp4", "-map", "1:a", "-c:a", "aac");
  for (const [file, words] of [
    [text, "not a video file"],
    [cut, "its end is missing"],
    [sound, "no picture"],
  ] as const) {
    const id = await send(marta, file, `${words}.mp4`);
    await completeUpload(marta, id, NOON);
    await work(marta);
    const row = find(marta, id);
    expect({ file, state: row?.state, says: row?.stateReason.includes(words) }).toEqual({
      file,
      state: "refused",
      says: true,
    });
    await expect(
      objectStorage().send(new HeadObjectCommand({ Bucket: env().S3_BUCKET, Key: row?.objectKey ?? "" })),
    ).rejects.toThrow();
  }
}, 60_000);

test("H.264 in MOV plays as it is, turned as the phone held it, and is served as MP4", async () => {
  const { marta } = aBench();
  const picture = ["-c:v", "libx264", "-pix_fmt", "yuv420p", "-c:a", "aac"];
  const flat = film("flat.mov", ...picture);
  const turned = join(folder, "turned.mov");
  const bytes = readFileSync(flat);
  // The matrix of the first track's header, a quarter turn (ISO/IEC 14496-12, 8.3.2: 40 bytes behind its name).
  const matrix = bytes.indexOf("tkhd") + 4 + 40;
  [0, 0x10000, 0, -0x10000, 0, 0, 0, 0, 0x40000000].forEach((n, at) =>
    bytes.writeInt32BE(n, matrix + at * 4),
  );
  writeFileSync(turned, bytes);
  const id = await send(marta, turned, "turned.mov");
  await completeUpload(marta, id, NOON);
  await work(marta);
  const row = find(marta, id);
  expect(row).toMatchObject({ state: "ready", container: "mov", width: 180, height: 320 });
  expect(row?.playKey).toBe(row?.objectKey);
  const link = await playbackLink(marta, id, NOON);
  expect((await fetch(link?.url ?? "", { method: "GET" })).headers.get("content-type")).toBe("video/mp4");
}, 60_000);

test("VP9 in WebM plays as it is; HEVC is converted to H.264 and then plays", async () => {
  const { marta } = aBench();
  const webm = film(
    "film.webm",
    "-c:v",
    "libvpx-vp9",
    "-b:v",
    "200k",
    "-deadline",
    "realtime",
    "-c:a",
    "libopus",
  );
  const first = await send(marta, webm, "film.webm");
  await completeUpload(marta, first, NOON);
  await work(marta);
  expect(find(marta, first)).toMatchObject({ state: "ready", container: "webm", videoCodec: "vp9" });
  const hevc = film(
    "film.mov",
    "-c:v",
    "libx265",
    "-x265-params",
    "log-level=error",
    "-tag:v",
    "hvc1",
    "-c:a",
    "aac",
  );
  const second = await send(marta, hevc, "film.mov");
  await completeUpload(marta, second, NOON);
  await checkRecording(
    { db: marta.db, shopId: marta.shopId, by: "test" } as ShopScope,
    { recordingId: second },
    NOON,
  );
  expect(find(marta, second)).toMatchObject({ state: "converting", container: "mov", videoCodec: "hevc" });
  expect(find(marta, second)?.stateReason).toBe(
    "This recording is HEVC (high efficiency) in MOV, which browsers do not all play. It is being converted.",
  );
  expect(await playbackLink(marta, second, NOON)).toBeNull();
  await work(marta);
  const row = find(marta, second);
  expect(row).toMatchObject({ state: "ready", stateReason: "" });
  const converted = await objectStorage().send(
    new GetObjectCommand({ Bucket: env().S3_BUCKET, Key: row?.playKey ?? "" }),
  );
  writeFileSync(join(folder, "converted.mp4"), (await converted.Body?.transformToByteArray()) ?? "");
  const probed = execFileSync(
    "ffprobe",
    ["-v", "error", "-show_entries", "stream=codec_name", "-of", "csv=p=0", join(folder, "converted.mp4")],
    { encoding: "utf8" },
  );
  expect(probed.trim().split("\n")).toEqual(["h264", "aac"]);
}, 120_000);

test("a trainee plays only what a published lesson plays", async () => {
  const { marta, dario, tom } = aBench();
  const id = await send(marta, good);
  await completeUpload(marta, id, NOON);
  await work(marta);
  expect(await playbackLink(tom, id, NOON)).toBeNull();
  expect(await playbackLink(dario, id, NOON)).not.toBeNull();
  const lesson = aPublishedLesson(marta, dario, []);
  const published = await playbackLink(tom, lesson.recordingId, NOON);
  expect(published).not.toBeNull();
}, 60_000);

test("a recording is kept while a lesson plays it, and gone for good when it is deleted", async () => {
  const { marta } = aBench();
  const id = await send(marta, good);
  await completeUpload(marta, id, NOON);
  await work(marta);
  aLesson(marta, { title: "Belt" }, id);
  expect(deleteRecording(marta, id, NOON)).toMatchObject({
    ok: false,
    reason: "used",
    sentence: expect.stringContaining("“Belt”"),
  });
  const free = await send(marta, good, "free.mp4");
  await completeUpload(marta, free, NOON);
  await work(marta);
  const key = find(marta, free)?.objectKey ?? "";
  expect(deleteRecording(marta, free, NOON)).toEqual({ ok: true });
  await work(marta);
  for (const what of ["poster", "storyboard"] as const)
    expect(await storedSize(madeKey(marta.shopId, free, what))).toBeNull();
  await expect(
    objectStorage().send(new HeadObjectCommand({ Bucket: env().S3_BUCKET, Key: key })),
  ).rejects.toThrow();
  expect(await playbackLink(marta, free, NOON)).toBeNull();
}, 60_000);

test("an upload that is cancelled, deleted or not finished for a week leaves nothing in storage", async () => {
  for (const give of ["cancel", "delete", "abandon"] as const) {
    const { marta, db } = aBench();
    const order = { fileName: `${give}.mp4`, sizeBytes: 100, lastModified: 1 };
    const plan = await beginUpload(marta, order, NOON);
    if (!plan.ok) throw new Error(plan.sentence);
    const { recordingId } = plan;
    const signed = await signParts(marta, recordingId, [1]);
    if (!signed.ok) throw new Error(signed.sentence);
    await fetch(signed.urls[1] ?? "", { method: "PUT", body: new Uint8Array(100) });
    const row = find(marta, recordingId);
    if (!row) throw new Error("no row");
    expect(await storedParts(row)).toHaveLength(1);
    expect(unfinishedUploads(marta).map(({ id }) => id)).toEqual([recordingId]);
    if (give === "cancel") expect(cancelUpload(marta, recordingId, NOON)).toEqual({ ok: true });
    else if (give === "delete") expect(deleteRecording(marta, recordingId, NOON)).toEqual({ ok: true });
    else {
      const week = NOON + 7 * 86_400_000;
      expect(await runNextTask(db, taskHandlers, () => week - 1)).toBe(false);
      expect(await runNextTask(db, taskHandlers, () => week)).toBe(true);
    }
    expect(find(marta, recordingId)?.deletedAt).not.toBeNull();
    while (await runNextTask(db, taskHandlers, () => NOON + 7 * 86_400_000));
    expect({ give, parts: await storedParts(row) }).toEqual({ give, parts: null });
    expect(unfinishedUploads(marta)).toEqual([]);
    const again = await beginUpload(marta, order, NOON);
    expect(again.ok && again.recordingId).not.toBe(recordingId);
  }
});

test("a server that stopped right after storage had completed the upload goes on without sending anything again", async () => {
  const { marta } = aBench();
  const id = await send(marta, good, "lost.mp4");
  const row = find(marta, id);
  if (!row) throw new Error("no row");
  const parts = (await storedParts(row)) ?? [];
  await objectStorage().send(
    new CompleteMultipartUploadCommand({
      Bucket: env().S3_BUCKET,
      Key: row.objectKey,
      UploadId: row.uploadId ?? "",
      MultipartUpload: { Parts: parts.map(({ n, etag }) => ({ PartNumber: n, ETag: etag })) },
    }),
  );
  const order = { fileName: "lost.mp4", sizeBytes: row.sizeBytes, lastModified: 1 };
  expect(await beginUpload(marta, order, NOON)).toMatchObject({ ok: true, recordingId: id, done: [1] });
  expect(await completeUpload(marta, id, NOON)).toEqual({ ok: true });
  expect(find(marta, id)?.state).toBe("checking");
});

test("an upload that storage has thrown away begins anew and leaves no second row", async () => {
  const { marta } = aBench();
  const order = { fileName: "old.mp4", sizeBytes: 100, lastModified: 1 };
  const first = await beginUpload(marta, order, NOON);
  if (!first.ok) throw new Error(first.sentence);
  const row = find(marta, first.recordingId);
  if (!row) throw new Error("no row");
  await abortStoredUpload(row);
  expect(await completeUpload(marta, first.recordingId, NOON)).toMatchObject({ ok: false, status: 404 });
  const second = await beginUpload(marta, order, NOON + 1);
  expect(second).toMatchObject({ ok: true, done: [] });
  expect(unfinishedUploads(marta).map(({ id }) => id)).toEqual([second.ok && second.recordingId]);
});

test("closing an upload twice at one time is one recording", async () => {
  const { marta, db } = aBench();
  const id = await send(marta, good);
  const both = await Promise.all([completeUpload(marta, id, NOON), completeUpload(marta, id, NOON)]);
  expect(both).toEqual([{ ok: true }, { ok: true }]);
  expect(db.select().from(tasks).where(eq(tasks.kind, "check-recording")).all()).toHaveLength(1);
});

test("a file that arrived with another size than declared is not taken", async () => {
  const { marta } = aBench();
  const id = await send(marta, good, "other.mp4");
  const row = find(marta, id);
  if (!row) throw new Error("no row");
  await abortStoredUpload(row);
  const put = { Bucket: env().S3_BUCKET, Key: row.objectKey, Body: new Uint8Array(row.sizeBytes - 1) };
  await objectStorage().send(new PutObjectCommand(put));
  expect(await completeUpload(marta, id, NOON)).toMatchObject({ ok: false, status: 409 });
  expect(find(marta, id)?.state).toBe("uploading");
});

test("an upright HEVC film becomes 720 wide and stays upright; its place names are gone", async () => {
  const { marta } = aBench();
  const x265 = [
    "-c:v",
    "libx265",
    "-preset",
    "ultrafast",
    "-x265-params",
    "log-level=error",
    "-tag:v",
    "hvc1",
  ];
  const upright = film(
    "upright.mov",
    ...["-vf", "scale=1080:1922", "-t", "1", ...x265, "-c:a", "aac", "-metadata", "location=+51.5-0.1/"],
  );
  const id = await send(marta, upright, "upright.mov");
  await completeUpload(marta, id, NOON);
  await work(marta);
  const row = find(marta, id);
  expect(row).toMatchObject({ state: "ready", playKey: madeKey(marta.shopId, id, "converted") });
  const copy = join(folder, "upright-copy.mp4");
  const link = await playbackLink(marta, id, NOON);
  writeFileSync(copy, new Uint8Array(await (await fetch(link?.url ?? "")).arrayBuffer()));
  const shown = ["-show_entries", "stream=width,height,pix_fmt:format_tags=location", "-of", "csv=p=0"];
  const probed = execFileSync("ffprobe", ["-v", "error", "-select_streams", "v", ...shown, copy]);
  expect(probed.toString().trim()).toBe("720,1282,yuv420p");
  expect(row?.posterKey).not.toBeNull();
}, 60_000);

test("a professional profile of H.264 is converted, as browsers do not play it", async () => {
  const { marta } = aBench();
  const camera = film("camera.mp4", "-t", "1", "-c:v", "libx264", "-pix_fmt", "yuv422p10le", "-c:a", "aac");
  const id = await send(marta, camera, "camera.mp4");
  await completeUpload(marta, id, NOON);
  await runNextTask(marta.db, taskHandlers, () => NOON, "light");
  expect(find(marta, id)).toMatchObject({ state: "converting", videoCodec: "avc-professional" });
  expect(listRecordings(marta)[0]).toMatchObject({ working: 1, stopped: 0 });
  await work(marta);
  expect(find(marta, id)?.state).toBe("ready");
  expect(listRecordings(marta)[0]).toMatchObject({ working: 0, stopped: 0 });
}, 60_000);

/** A recording that waits for its conversion, with these bytes in storage. */
async function aConverting(scope: Scope, body: Uint8Array) {
  const id = aRecording(scope, {
    state: "converting",
    container: "mov",
    videoCodec: "hevc",
    sizeBytes: body.length,
    playKey: null,
  });
  const Key = find(scope, id)?.objectKey ?? "";
  await objectStorage().send(new PutObjectCommand({ Bucket: env().S3_BUCKET, Key, Body: body }));
  return id;
}

const shopOf = ({ db, shopId }: Scope): ShopScope => ({ db, shopId, by: "test" });

test("a film that the converter cannot read needs converting by hand; storage that is not there is tried again", async () => {
  const { marta } = aBench();
  const broken = await aConverting(marta, new Uint8Array(5000));
  await convertRecording(shopOf(marta), { recordingId: broken }, NOON);
  expect(find(marta, broken)).toMatchObject({ state: "needs-converting", playKey: null });
  expect(find(marta, broken)?.stateReason).toMatch(
    /^This recording could not be converted here\. The converter stopped: .+\. Export it/,
  );
  expect(find(marta, broken)?.stateReason).not.toContain("http");
  const lost = aRecording(marta, { state: "converting", container: "mov", playKey: null });
  await expect(convertRecording(shopOf(marta), { recordingId: lost }, NOON)).rejects.toThrow();
  expect(find(marta, lost)?.state).toBe("converting");
}, 60_000);

test("a recording that is deleted while it is converted leaves no copy behind", async () => {
  const { marta } = aBench();
  const id = await aConverting(marta, readFileSync(good));
  const converting = convertRecording(shopOf(marta), { recordingId: id }, NOON);
  expect(deleteRecording(marta, id, NOON)).toEqual({ ok: true });
  await work(marta);
  await converting;
  expect(await storedSize(madeKey(marta.shopId, id, "converted"))).toBeNull();
  expect(find(marta, id)).toMatchObject({ playKey: null, state: "converting" });
}, 60_000);

test("high sounds have peaks too", async () => {
  const { marta } = aBench();
  const click = film("click.mp4", "-af", "asetrate=44100*6,aresample=44100", "-t", "0.6", "-c:a", "aac");
  const id = await send(marta, click, "click.mp4");
  await completeUpload(marta, id, NOON);
  await work(marta);
  // 440 Hz played six times as fast: 2,640 Hz.
  expect(Math.max(...readPeaks(find(marta, id)?.peaks ?? null))).toBeGreaterThan(10);
}, 60_000);

test("pictures from the browser are kept where the server makes none, and nothing but pictures", async () => {
  const { marta, dario } = aBench();
  const id = await send(marta, good);
  await completeUpload(marta, id, NOON);
  const jpeg = Uint8Array.from([0xff, 0xd8, 0xff, 0xe0, 0]);
  const made = { poster: jpeg, storyboard: jpeg, peaks: soundPeaks(new Int16Array(10)) };
  expect(await keepPictures(dario, id, made)).toMatchObject({ ok: false, status: 404 });
  expect(await keepPictures(marta, id, { ...made, poster: new Uint8Array(9) })).toMatchObject({
    ok: false,
    status: 422,
  });
  expect(await keepPictures(marta, id, { ...made, peaks: "x" })).toMatchObject({ ok: false, status: 422 });
  expect(find(marta, id)?.posterKey).toBeNull();
  expect(await keepPictures(marta, id, made)).toEqual({ ok: true });
  expect(find(marta, id)).toMatchObject({ peaks: made.peaks });
  expect(await pictureLink(marta, id, "poster", NOON)).not.toBeNull();
  const refused = aRecording(marta, { state: "refused" });
  expect(await keepPictures(marta, refused, made)).toMatchObject({ ok: false, status: 404 });
});
