import Link from "next/link";

export default function MessageNotFound() {
  return (
    <>
      <h1 className="text-3xl">There is no such message</h1>
      <p className="mt-2 mb-4 text-ink-2">Only the newest are kept.</p>
      <Link href="/mailbox" className="row-link">
        All messages
      </Link>
    </>
  );
}
