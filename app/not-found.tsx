import Link from "next/link";
import { WordMark } from "@/components/shell/mark";
import { buttonLook } from "@/components/ui/button-look";

export default function NotFound() {
  return (
    <main className="mx-auto flex min-h-dvh max-w-120 flex-col justify-center px-4 py-12">
      <WordMark className="mb-10" />
      <h1>This page is not in the book</h1>
      <p className="mt-2 text-16 text-ink-soft">
        The address may be mistyped, the record may have been moved, or it belongs to another shop.
      </p>
      <p className="mt-6">
        <Link href="/" className={buttonLook("secondary")}>
          Go to the first page
        </Link>
      </p>
    </main>
  );
}
