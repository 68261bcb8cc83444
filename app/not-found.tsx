import { connection } from "next/server";
import { PlainPage } from "@/components/layout/plain-page";

export default async function NotFound() {
  // A page made at build time would carry no nonce, and its scripts would be refused.
  await connection();
  return (
    <PlainPage title="There is nothing at this address">
      It may have been deleted, the link may be incomplete, or it belongs to a workspace that you are not a member of.
    </PlainPage>
  );
}
