import { AppError } from "@/lib/errors";
import { readBody } from "./read-body";

/** What a form wraps around the file: boundaries, headings, the file's name, small fields. */
const WRAPPING = 8 * 1024;

export type UploadRules = {
  maxBytes: number;
  /** Said when there is more: what to do instead. */
  tooLarge: string;
  /** Said when the form holds no file: what to choose. */
  missing: string;
};

export type Upload = {
  bytes: Uint8Array;
  name: string;
  /** The text of another field of the form; null when it is not there or empty. */
  field: (name: string) => string | null;
};

/**
 * The file in the form field "file" of a multipart request, read no further than `maxBytes` whatever the sender says of its
 * length. Throws `too-large`, or `invalid` when there is no file.
 */
export async function readUpload(request: Request, rules: UploadRules): Promise<Upload> {
  const chunks = await readBody(request, rules.maxBytes + WRAPPING);
  if (chunks === null) throw new AppError("too-large", rules.tooLarge);
  const form = await formOf(new Blob(chunks), request.headers.get("content-type") ?? "");
  const file = form?.get("file");
  if (!(file instanceof File)) throw new AppError("invalid", rules.missing);
  if (file.size > rules.maxBytes) throw new AppError("too-large", rules.tooLarge);
  return {
    bytes: new Uint8Array(await file.arrayBuffer()),
    name: file.name,
    field: (name) => {
      const value = form?.get(name);
      return typeof value === "string" && value !== "" ? value : null;
    },
  };
}

/** The form, or null for a body that is none: the same answer as one without a file. */
async function formOf(body: Blob, contentType: string): Promise<FormData | null> {
  try {
    return await new Response(body, { headers: { "content-type": contentType } }).formData();
  } catch {
    return null;
  }
}
