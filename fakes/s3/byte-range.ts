/** First and last byte of a body, both counted in. */
export type ByteRange = Readonly<{ start: number; end: number }>;

/**
 * What a Range header asks of a body of `size` bytes (RFC 9110, section 14): "whole" without a header and for one that
 * is malformed, of another unit or of several ranges, which S3 does not serve; "unsatisfiable" outside the body.
 */
export function readByteRange(
  header: string | undefined,
  size: number,
): ByteRange | "whole" | "unsatisfiable" {
  const found = /^bytes=\s*(\d*)-(\d*)\s*$/i.exec(header ?? "");
  if (!found) return "whole";
  const [, from = "", to = ""] = found;
  if (from === "" && to === "") return "whole";
  if (from === "") {
    const length = Math.min(Number(to), size);
    return length === 0 ? "unsatisfiable" : { start: size - length, end: size - 1 };
  }
  if (to !== "" && Number(to) < Number(from)) return "whole";
  if (Number(from) >= size) return "unsatisfiable";
  return { start: Number(from), end: to === "" ? size - 1 : Math.min(Number(to), size - 1) };
}
