/**
 * The body of a request in pieces, read no further than `maxBytes` whatever the sender says of its length; null when there
 * is more. A length that is told is believed before anything is read.
 */
export async function readBody(
  request: Request,
  maxBytes: number,
): Promise<Uint8Array<ArrayBuffer>[] | null> {
  if (Number(request.headers.get("content-length") ?? 0) > maxBytes) return null;
  const chunks: Uint8Array<ArrayBuffer>[] = [];
  const reader = request.body?.getReader();
  let total = 0;
  while (reader) {
    const { done, value } = await reader.read();
    if (done) break;
    total += value.byteLength;
    if (total > maxBytes) {
      await reader.cancel();
      return null;
    }
    chunks.push(value);
  }
  return chunks;
}
