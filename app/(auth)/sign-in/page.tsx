import type { Metadata } from "next";
import Link from "next/link";
import { demoAccounts } from "@/db/demo-accounts";
import { safeNextPath } from "@/lib/auth/next-path";
import { SignInForm } from "../_components/sign-in-form";

export const metadata: Metadata = { title: "Sign in" };

export default async function SignInPage({ searchParams }: PageProps<"/sign-in">) {
  const { next } = await searchParams;
  return (
    <>
      <h1 className="text-[29px]/[36px] font-title tracking-[-.015em]">See what a shortage costs before it comes.</h1>
      <p className="mt-2 text-l text-ink-2">
        Sketch the line, give it your own figures, and read what it ships in 9 weeks of 10.
      </p>
      <SignInForm next={safeNextPath(next)} demo={demoAccounts()} />
      <p className="mt-6 text-s text-ink-3">
        New here? <Link href="/sign-up">Make an account</Link>
      </p>
    </>
  );
}
