import AxeBuilder from "@axe-core/playwright";
import { expect, type Page } from "@playwright/test";
import { demoPasswords } from "./demo-passwords";

/** Collects what a page complains of; `expectQuiet` fails on anything. */
export function watch(page: Page, allowed: readonly RegExp[] = []) {
  const problems: string[] = [];
  page.on("console", (message) => {
    if (message.type() !== "error" && message.type() !== "warning") return;
    const text = `${message.type()}: ${message.text()} ${message.location().url}`;
    if (!allowed.some((pattern) => pattern.test(text))) problems.push(text);
  });
  page.on("pageerror", (error) => problems.push(String(error)));
  return { expectQuiet: () => expect(problems).toEqual([]) };
}

export async function signIn(page: Page, role: keyof typeof demoPasswords) {
  await page.goto("/sign-in");
  await page.getByRole("button", { name: demoPasswords[role].name }).click();
  await page.getByRole("button", { name: "Sign in", exact: true }).click();
  await page.waitForURL("**/lines");
}

export async function openLine(page: Page, name = "Drive unit line") {
  await page.getByRole("link", { name, exact: true }).click();
  await page.waitForURL("**/sketch**");
  await expect(page.getByRole("link", { name: "Sketch", exact: true })).toBeVisible();
}

/** A line of the test's own: what one test edits, no other finds. */
export async function makeLine(page: Page, name: string, from: "An empty sheet" | "The example line") {
  await page.getByRole("button", { name: "New line" }).first().click();
  await page.getByRole("radio", { name: new RegExp(`^${from}`) }).check();
  await page.getByRole("textbox", { name: "Name" }).fill(name);
  await page.getByRole("button", { name: "Make the line" }).click();
  await page.waitForURL("**/sketch**");
}

/** The headline of the result strip, as text. */
export function headline(page: Page) {
  return page.getByText(/In 9 of 10 weeks we ship at least/).first();
}

export const lineIdOf = (page: Page) => /\/lines\/([^/]+)/.exec(page.url())?.[1] ?? "";

/** Nothing on the page that WCAG 2.1 A or AA forbids, as far as axe can see. */
export async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).withTags(["wcag2a", "wcag2aa", "wcag21aa"]).analyze();
  expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([]);
}
