import { SizingView } from "@/components/sizing/sizing-view";

export default function SizingPage() {
  return <SizingView />;
}
