import { expect, test } from "vitest";
import { PartSlots } from "./part-slots";

test("no more than three at a time, the next in the order of asking, a slot given back twice is one", async () => {
  const slots = new PartSlots(3);
  const taken: number[] = [];
  const back: (() => void)[] = [];
  const all = [1, 2, 3, 4, 5, 6].map(async (n) => {
    back[n] = await slots.take();
    taken.push(n);
  });
  await new Promise((resolve) => setTimeout(resolve, 5));
  expect(taken).toEqual([1, 2, 3]);
  back[2]?.();
  back[2]?.();
  await new Promise((resolve) => setTimeout(resolve, 5));
  expect(taken).toEqual([1, 2, 3, 4]);
  back[1]?.();
  back[4]?.();
  await Promise.all(all);
  expect(taken).toEqual([1, 2, 3, 4, 5, 6]);
});
