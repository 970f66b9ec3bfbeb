import "server-only";
import { AuthError } from "next-auth";
import { AppError } from "@/lib/errors";
import { signIn } from "./auth";

const NOT_SENT = "The link could not be sent just now. Try again in a moment.";

/** Makes a sign-in link for the address and queues the mail with it; known and unknown addresses are treated alike. Throws `refused`. */
export async function sendLink(email: string, redirectTo: string): Promise<void> {
  let answer: unknown;
  try {
    answer = await signIn("nodemailer", { email, redirect: false, redirectTo });
  } catch (error) {
    if (error instanceof AuthError) throw new AppError("refused", NOT_SENT);
    throw error;
  }
  if (typeof answer !== "string" || new URL(answer, "http://own.invalid").searchParams.has("error"))
    throw new AppError("refused", NOT_SENT);
}
