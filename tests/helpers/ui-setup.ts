import "@testing-library/jest-dom/vitest";
import { cleanup } from "@testing-library/react";
import { afterEach, vi } from "vitest";
import { address } from "./navigation";

vi.mock("next/navigation", () => import("./navigation"));

afterEach(() => {
  cleanup();
  address.search = "";
  address.push.mockReset();
});
