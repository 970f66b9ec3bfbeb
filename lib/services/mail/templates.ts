/** What each message needs to be written. Dates and times come as the reader will read them. */
export type MailTemplates = {
  "sign-in": { link: string; minutes: number };
  invitation: {
    name: string;
    company: string;
    production: string | null;
    position: string;
    link: string;
    from: string;
  };
  "audition-invitation": {
    name: string;
    production: string;
    when: string;
    where: string;
    link: string;
  };
  "audition-moved": { name: string; production: string; when: string; where: string; link: string };
  callback: {
    name: string;
    production: string;
    roles: string;
    when: string;
    where: string;
    link: string;
  };
  "call-sheet": {
    name: string;
    production: string;
    day: string;
    number: number;
    changes: string[];
    link: string;
  };
  "password-changed": { name: string };
};

export type Message = { subject: string; text: string; html: string };

type Parts = {
  subject: string;
  lines: string[];
  button?: { label: string; href: string };
  after?: string[];
};

const WRITERS: { [K in keyof MailTemplates]: (data: MailTemplates[K]) => Parts } = {
  "sign-in": (d) => ({
    subject: "Your link to sign in to Cembalo",
    lines: [`This link signs you in once. It is good for ${String(d.minutes)} minutes.`],
    button: { label: "Sign in", href: d.link },
    after: ["If you did not ask for it, do nothing: nobody is signed in until the link is used."],
  }),
  invitation: (d) => ({
    subject: d.production ? `${d.company}: ${d.production}` : d.company,
    lines: [
      `Dear ${d.name},`,
      `${d.from} has put you down as ${d.position.toLowerCase()}${d.production ? ` of ${d.production}` : ""} at ${d.company}.`,
    ],
    button: { label: "Accept and sign in", href: d.link },
    after: ["If this is not for you, you can leave it: nothing happens until you accept."],
  }),
  "audition-invitation": (d) => ({
    subject: `Your audition for ${d.production}: ${d.when}`,
    lines: [
      `Dear ${d.name},`,
      `We would like to hear you for ${d.production} on ${d.when}, ${d.where}.`,
      "Please confirm the time, tell us your range, and say which dates are impossible.",
    ],
    button: { label: "Confirm your time", href: d.link },
  }),
  "audition-moved": (d) => ({
    subject: `New time for your audition: ${d.when}`,
    lines: [
      `Dear ${d.name},`,
      `Your audition for ${d.production} is now on ${d.when}, ${d.where}. Please confirm the new time.`,
    ],
    button: { label: "Confirm the new time", href: d.link },
  }),
  callback: (d) => ({
    subject: `Callback for ${d.production}`,
    lines: [
      `Dear ${d.name},`,
      `You are called back for ${d.roles} in ${d.production}: ${d.when}, ${d.where}.`,
    ],
    button: { label: "See and answer", href: d.link },
  }),
  "call-sheet": (d) => ({
    subject: `${d.production}, ${d.day}: call sheet, issue ${String(d.number)}`,
    lines: [
      `Dear ${d.name},`,
      ...(d.changes.length > 0
        ? ["Changed since the last issue:", ...d.changes]
        : ["The call sheet is out."]),
    ],
    button: { label: "Read and acknowledge", href: d.link },
  }),
  "password-changed": (d) => ({
    subject: "Your Cembalo password was changed",
    lines: [
      `Dear ${d.name},`,
      "Your password was changed. If that was not you, sign in by e-mail link and set a new one; other sessions were ended.",
    ],
  }),
};

const escapeHtml = (text: string): string =>
  text.replace(
    /[&<>"']/g,
    (c) => ({ "&": "&amp;", "<": "&lt;", ">": "&gt;", '"': "&quot;", "'": "&#39;" })[c] ?? c,
  );

/** Writes a message: subject, plain text and the same as simple HTML. Header injection is cut off at line breaks. */
export function writeMessage<K extends keyof MailTemplates>(
  template: K,
  data: MailTemplates[K],
): Message {
  const parts = WRITERS[template](data);
  const text = [
    ...parts.lines,
    ...(parts.button ? [`${parts.button.label}: ${parts.button.href}`] : []),
    ...(parts.after ?? []),
    "Cembalo",
  ].join("\n\n");
  const paragraphs = (lines: string[]): string =>
    lines.map((line) => `<p style="margin:0 0 14px">${escapeHtml(line)}</p>`).join("");
  const button = parts.button
    ? `<p style="margin:22px 0"><a href="${escapeHtml(parts.button.href)}" style="background:#1c1814;color:#fffdf8;padding:12px 20px;border-radius:4px;text-decoration:none;font-weight:bold">${escapeHtml(parts.button.label)}</a></p>`
    : "";
  const html = `<!doctype html><html lang="en"><body style="background:#faf6ee;color:#1c1814;font:16px/1.5 Georgia,serif;padding:24px"><div style="max-width:34rem;margin:0 auto">${paragraphs(parts.lines)}${button}${paragraphs(parts.after ?? [])}<p style="border-top:2px solid #b3301b;padding-top:10px;font-style:italic">Cembalo</p></div></body></html>`;
  return { subject: parts.subject.replace(/[\r\n]+/g, " ").slice(0, 200), text, html };
}
