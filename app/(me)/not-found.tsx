import Link from "next/link";

export default function OwnPageNotFound() {
  return (
    <>
      <h1 className="text-3xl">That is not here</h1>
      <p className="mt-2 mb-4 text-ink-2">
        It may have been changed or taken back since the link was made.
      </p>
      <Link href="/me" className="row-link">
        Go to my page
      </Link>
    </>
  );
}
