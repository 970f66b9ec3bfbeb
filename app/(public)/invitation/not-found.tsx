import Link from "next/link";

export default function InvitationNotFound() {
  return (
    <>
      <h1 className="text-3xl md:text-4xl">There is no such invitation</h1>
      <p className="text-lg">
        Some mail programs break long links: copy all of it into the address bar. If it still is not
        here, it was taken back; ask the company to send another.
      </p>
      <Link href="/sign-in" className="row-link">
        Sign in
      </Link>
    </>
  );
}
