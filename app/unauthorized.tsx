import Link from "next/link";
import { PlainPage } from "@/components/layout/plain-page";

export default function Unauthorized() {
  return (
    <PlainPage title="You are signed out" action={<Link href="/sign-in">Sign in</Link>}>
      Sign in to open this page. What was shown as saved is saved.
    </PlainPage>
  );
}
