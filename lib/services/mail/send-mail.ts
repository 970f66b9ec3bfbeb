import "server-only";
import nodemailer from "nodemailer";
import type { Transporter } from "nodemailer";
import { env } from "@/lib/env";
import type { Message } from "./templates";

let transport: Transporter | undefined;

/** Sends one message by SMTP. Throws when the server does not take it; the caller decides about trying again. */
export async function sendMail(to: string, message: Message): Promise<void> {
  transport ??= nodemailer.createTransport(env().SMTP_URL);
  await transport.sendMail({ from: env().MAIL_FROM, to, ...message });
}
