import { z } from "zod";
import { requirePermission } from "~/auth/require.server";
import { scopeContext } from "~/context";
import { foundJson } from "~/search/found-json";
import { searchShop } from "~/search/search-shop.server";
import type { Route } from "./+types/search";

const Asked = z.object({
  q: z.string().max(300, "Ask in 300 characters or fewer.").default(""),
  vehicle: z
    .union([z.literal(""), z.string().regex(/^[0-9A-HJKMNP-TV-Z]{26}$/, "That vehicle is not in your shop.")])
    .default(""),
  limit: z.coerce
    .number("limit is a number from 1 to 50.")
    .int()
    .min(1, "limit is a number from 1 to 50.")
    .max(50, "limit is a number from 1 to 50.")
    .default(10),
});

/** Values, moments and lessons for other programs and for the search box. */
export function loader({ context, url }: Route.LoaderArgs) {
  const scope = context.get(scopeContext);
  requirePermission(scope, "lesson:watch");
  const asked = Asked.safeParse(Object.fromEntries(url.searchParams));
  if (!asked.success) return Response.json({ error: asked.error.issues[0]?.message }, { status: 400 });
  const { q, vehicle, limit } = asked.data;
  return Response.json(foundJson(searchShop(scope, q, vehicle, limit)), {
    headers: { "Cache-Control": "private, no-store" },
  });
}
