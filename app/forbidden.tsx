import { PlainPage } from "@/components/layout/plain-page";

export default function Forbidden() {
  return (
    <PlainPage title="Your role may not open this page">
      An owner of the workspace can give you a role that may. Nothing was changed.
    </PlainPage>
  );
}
