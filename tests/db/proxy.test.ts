import { NextRequest } from "next/server";
import { describe, expect, it, vi } from "vitest";
import { proxy } from "@/proxy";

const ask = (path: string, cookie?: string) =>
  proxy(new NextRequest(`http://localhost:3000${path}`, { headers: cookie ? { cookie } : {} }));
const signedIn = "better-auth.session_token=x.y";

describe("proxy", () => {
  it("sends who has no session cookie to the sign-in, which knows the way back", () => {
    const answer = ask("/lines/a/sketch?scenario=b");
    expect(answer.status).toBe(307);
    expect(answer.headers.get("location")).toBe(
      "http://localhost:3000/sign-in?next=%2Flines%2Fa%2Fsketch%3Fscenario%3Db",
    );
  });

  it("lets the sign-in, shared pages and who has a cookie through", () => {
    for (const answer of [ask("/sign-in"), ask("/s/token"), ask("/lines", signedIn)]) {
      expect(answer.headers.get("location")).toBeNull();
      expect(answer.headers.get("x-middleware-next")).toBe("1");
    }
  });

  it("gives each answer its own nonce and allows no foreign or inline script", () => {
    const policies = [ask("/lines", signedIn), ask("/lines", signedIn)].map((answer) =>
      answer.headers.get("content-security-policy")!,
    );
    expect(policies[0]).not.toBe(policies[1]);
    const scripts = policies[0].split("; ").find((part) => part.startsWith("script-src"))!;
    expect(scripts).toMatch(/'nonce-[A-Za-z0-9+/=]+'/);
    expect(scripts).not.toContain("unsafe");
    expect(policies[0]).toContain("frame-ancestors 'none'");
  });

  it("asks browsers to stay on https where that is the public address", () => {
    expect(ask("/sign-in").headers.get("strict-transport-security")).toBeNull();
    vi.stubEnv("APP_URL", "https://forebay.example");
    expect(ask("/sign-in").headers.get("strict-transport-security")).toContain("max-age");
    vi.unstubAllEnvs();
  });
});
