import { notFound } from "~/auth/require.server";

// A page of our own for every unknown address, so that the framework's technical words never show.
export function loader() {
  return notFound("page");
}

export default function NotFound() {
  return null;
}
