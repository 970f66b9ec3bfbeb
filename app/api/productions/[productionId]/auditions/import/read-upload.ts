import { AppError } from "@/lib/errors";

/** What a form wraps around the file: boundaries, headings, the file's name. */
const WRAPPING = 8 * 1024;

/**
 * The one file of a multipart form, read no further than `maxBytes`. Throws `too-large`, or `invalid` when there is no
 * file in the field "file".
 */
export async function readUpload(
  request: Request,
  maxBytes: number,
): Promise<{ bytes: Uint8Array; name: string }> {
  const tooLarge = (): AppError =>
    new AppError(
      "too-large",
      `This file is over ${String(maxBytes / 1024 / 1024)} MB. Remove pictures and other sheets, or save it as CSV.`,
    );
  if (Number(request.headers.get("content-length") ?? 0) > maxBytes + WRAPPING) throw tooLarge();
  const chunks: Uint8Array<ArrayBuffer>[] = [];
  let total = 0;
  if (request.body) {
    const reader = request.body.getReader();
    for (;;) {
      const { done, value } = await reader.read();
      if (done) break;
      total += value.byteLength;
      if (total > maxBytes + WRAPPING) {
        await reader.cancel();
        throw tooLarge();
      }
      chunks.push(value);
    }
  }
  const file = await fileOf(new Blob(chunks), request.headers.get("content-type") ?? "");
  if (file.size > maxBytes) throw tooLarge();
  return { bytes: new Uint8Array(await file.arrayBuffer()), name: file.name };
}

async function fileOf(body: Blob, contentType: string): Promise<File> {
  try {
    const form = await new Response(body, { headers: { "content-type": contentType } }).formData();
    const file = form.get("file");
    if (file instanceof File && file.size > 0) return file;
  } catch {
    // Not a multipart form at all: the same answer as one without a file.
  }
  throw new AppError("invalid", "Choose an .xlsx or .csv file first.");
}
