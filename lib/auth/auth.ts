import "server-only";
import { DrizzleAdapter } from "@auth/drizzle-adapter";
import NextAuth from "next-auth";
import type { Adapter } from "next-auth/adapters";
import type { Provider } from "next-auth/providers";
import Nodemailer from "next-auth/providers/nodemailer";
import type { NextRequest } from "next/server";
import { db } from "@/db/client";
import { accounts, sessions, users, verificationTokens } from "@/db/schema";
import { createLogin, createSignInMail } from "@/lib/data/sign-in";
import { takeVerificationToken } from "@/lib/data/verification";
import { env } from "@/lib/env";
import { emailField } from "@/lib/schemas/common";
import { newSecret } from "./hash-token";
import { SESSION_DAYS } from "./session-cookie";
import { startSession } from "./start-session";

const LINK_MINUTES = 30;

type AdapterTables = NonNullable<Parameters<typeof DrizzleAdapter<typeof db>>[1]>;

// Our ids and exact-text columns are custom types, which the adapter's own table types do not foresee.
const base = DrizzleAdapter(db, {
  usersTable: users,
  accountsTable: accounts,
  sessionsTable: sessions,
  verificationTokensTable: verificationTokens,
} as unknown as AdapterTables) as Required<Adapter>;

const adapter: Adapter = {
  ...base,
  createUser: (user) => createLogin(user.email, user.emailVerified),
  createSession: (session) => startSession(session),
  useVerificationToken: takeVerificationToken,
};

const nextAuth = NextAuth({
  adapter,
  session: {
    strategy: "database",
    maxAge: SESSION_DAYS * 86_400,
    // Never moved on: a session that somebody else came by ends with its thirty days, however often it is used.
    updateAge: SESSION_DAYS * 86_400,
    generateSessionToken: newSecret,
  },
  secret: env().AUTH_SECRET,
  trustHost: true,
  pages: {
    signIn: "/sign-in",
    error: "/sign-in",
    verifyRequest: "/sign-in/sent",
    signOut: "/account",
  },
  providers: [
    Nodemailer({
      server: env().SMTP_URL,
      from: env().MAIL_FROM,
      maxAge: LINK_MINUTES * 60,
      // Throws on what is not one plain address, before anything is sent anywhere.
      normalizeIdentifier: (identifier) => emailField.parse(identifier),
      async sendVerificationRequest({ identifier, url }) {
        // The mail links to a page with a button, so that a mail scanner that follows links does not use the link up.
        const page = new URL("/sign-in/link", env().AUTH_URL);
        page.search = new URL(url).search;
        await createSignInMail(identifier, page.toString(), LINK_MINUTES);
      },
    }) as Provider,
  ],
  callbacks: {
    // The default would hand out the whole row of the user.
    session: ({ session, user }) => ({
      expires: session.expires,
      user: { id: user.id, name: user.name ?? null, email: user.email },
    }),
  },
  logger: { error: () => undefined, warn: () => undefined, debug: () => undefined },
});

export const { auth, signIn } = nextAuth;

const CALLBACK = "/api/auth/callback/nodemailer";

/**
 * The one address of Auth.js that the product uses over HTTP: where a link's button leads. Asking for a link and signing
 * out go through our own actions; answering here too would go round the limits that those keep.
 */
export const handlers = {
  GET: (request: NextRequest): Promise<Response> =>
    request.nextUrl.pathname === CALLBACK
      ? nextAuth.handlers.GET(request)
      : Promise.resolve(new Response(null, { status: 404 })),
};
