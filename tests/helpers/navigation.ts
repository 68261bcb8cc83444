import { vi } from "vitest";

/** Where the page under test stands; stands in for Next's router, which a component alone does not have. */
export const address = { pathname: "/lines/l-1/sketch", search: "", push: vi.fn() };

export const usePathname = () => address.pathname;
export const useRouter = () => ({ push: address.push });
export const useSearchParams = () => new URLSearchParams(address.search);
