import "server-only";
import nodemailer from "nodemailer";
import type { Transporter } from "nodemailer";
import { env } from "@/lib/env";
import type { Message } from "./templates";

let transport: Transporter | undefined;

/** Sends one message by SMTP. Throws when the server does not take it; the caller decides about trying again. */
export async function sendMail(to: string, message: Message): Promise<void> {
  // One connection for many messages: a batch of invitations must not take a handshake each.
  transport ??= nodemailer.createTransport({ url: env().SMTP_URL, pool: true });
  await transport.sendMail({ from: env().MAIL_FROM, to, ...message });
}
