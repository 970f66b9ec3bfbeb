import "server-only";
import { notFound } from "next/navigation";
import { asAppError } from "@/lib/errors";

/**
 * For pages: runs a data function and turns what is not the reader's into the not-found page; a page they may not use
 * looks the same as one that does not exist. Other errors go on to the error page.
 */
export async function orNotFound<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    const code = asAppError(error)?.code;
    if (code === "not-found" || code === "not-allowed") notFound();
    throw error;
  }
}
