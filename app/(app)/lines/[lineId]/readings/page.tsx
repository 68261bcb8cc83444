import { ReadingsView } from "@/components/readings/readings-view";

export default function ReadingsPage() {
  return <ReadingsView />;
}
