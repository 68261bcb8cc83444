import type { Metadata } from "next";
import Link from "next/link";
import { connection } from "next/server";
import { SignUpForm } from "../_components/sign-up-form";

export const metadata: Metadata = { title: "Make an account" };

export default async function SignUpPage() {
  // The nonce of the page's scripts is made for each request.
  await connection();
  return (
    <>
      <h1 className="text-[29px]/[36px] font-title tracking-[-.015em]">Make an account</h1>
      <p className="mt-2 text-l text-ink-2">It comes with a workspace of your own, in which you may do everything.</p>
      <SignUpForm />
      <p className="mt-6 text-s text-ink-3">
        Have one already? <Link href="/sign-in">Sign in</Link>
      </p>
    </>
  );
}
