import "server-only";
import type { z } from "zod";
import { readBody } from "@/lib/formats/multipart/read-body";
import { ApiError } from "./define-api-route";

const MAX_JSON_BYTES = 1_000_000;

/** The JSON body of a request, checked by its schema. Throws 413, or 400 with where it is wrong. */
export async function readJson<S extends z.ZodType>(
  request: Request,
  schema: S,
): Promise<z.output<S>> {
  const chunks = await readBody(request, MAX_JSON_BYTES);
  if (chunks === null) throw new ApiError(413, "request.too-large", "Send at most 1 MB of JSON.");
  let value: unknown;
  try {
    value = JSON.parse(await new Blob(chunks).text());
  } catch {
    throw new ApiError(400, "request.not-json", "The body is not JSON.");
  }
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  const issue = parsed.error.issues[0];
  throw new ApiError(
    400,
    "request.invalid",
    issue?.message ?? "The body has not the form it should have.",
    issue?.path.join("."),
  );
}

/** The one uploaded file of a multipart request, field `file`. Throws 400, 413 or 415. */
export async function readFileField(
  request: Request,
  maxBytes: number,
): Promise<{ name: string; bytes: Uint8Array }> {
  const contentType = request.headers.get("content-type") ?? "";
  if (!contentType.startsWith("multipart/form-data")) {
    throw new ApiError(
      415,
      "request.not-multipart",
      "Send the file as multipart/form-data, in the field `file`.",
    );
  }
  const tooLarge = (): ApiError =>
    new ApiError(
      413,
      "request.too-large",
      `Send at most ${String(Math.floor(maxBytes / 1_048_576))} MB.`,
    );
  const chunks = await readBody(request, maxBytes + 10_000);
  if (chunks === null) throw tooLarge();
  let form: FormData;
  try {
    form = await new Response(new Blob(chunks), {
      headers: { "content-type": contentType },
    }).formData();
  } catch {
    throw new ApiError(400, "request.broken-upload", "The upload broke off. Send it again.");
  }
  const file = form.get("file");
  if (!(file instanceof File))
    throw new ApiError(400, "request.no-file", "There is no file in the field `file`.", "file");
  if (file.size > maxBytes) throw tooLarge();
  return { name: file.name, bytes: new Uint8Array(await file.arrayBuffer()) };
}
