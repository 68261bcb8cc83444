import { SketchView } from "@/components/line/sketch-view";

export default function SketchPage() {
  return <SketchView />;
}
