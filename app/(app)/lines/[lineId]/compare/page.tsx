import { CompareView } from "@/components/compare/compare-view";

export default function ComparePage() {
  return <CompareView />;
}
