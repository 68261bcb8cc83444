import { expect, test } from "@playwright/test";
import { headline, makeLine, openLine, signIn, watch } from "./helpers";

test("an engineer changes the line, runs it, compares sizes, keeps and shares; a manager reads the link", async ({
  page,
  browser,
}) => {
  const { expectQuiet } = watch(page);
  await signIn(page, "engineer");
  await openLine(page);
  await expect(headline(page)).toBeVisible();
  const before = await headline(page).textContent();

  // Change a size on the sheet; the draft is saved and a live reading follows.
  await page.getByRole("group", { name: /^Controller boards, purchased buffer/ }).click();
  const size = page.getByRole("textbox", { name: "Order-up-to level" });
  await expect(size).toHaveValue("5250");
  await size.fill("5750");
  await expect(page.getByText("1 edit not kept")).toBeVisible();
  await expect(page.getByText(/With your edit, about/)).toBeVisible();
  await expect(page.getByText(/^Saved \d\d:\d\d/)).toBeVisible();

  // Undo and redo.
  await page.getByRole("button", { name: /^Undo/ }).click();
  await expect(size).toHaveValue("5250");
  await page.getByRole("button", { name: /^Redo/ }).click();
  await expect(size).toHaveValue("5750");

  // The full ten thousand weeks, in the browser.
  await page.getByRole("button", { name: /^Run 10.000 weeks/ }).click();
  await expect(page.getByRole("button", { name: /^Cancel run/ })).toBeVisible();
  await expect(page.getByRole("button", { name: /^Run again/ })).toBeVisible({ timeout: 120_000 });
  await expect(headline(page)).not.toHaveText(before ?? "");

  // Readings of that run.
  await page.getByRole("link", { name: "Readings", exact: true }).click();
  await expect(page.getByRole("heading", { name: /^Nine weeks in ten reach/ })).toBeVisible();
  await expect(page.getByRole("row", { name: /^P10 1 in 10/ })).toBeVisible();
  await page.getByRole("button", { name: /^Draw / }).click();
  await expect(page.getByRole("img", { name: /^Lowest weekly stock of/ })).toBeVisible({ timeout: 120_000 });

  // Keep, then the figures can be had again to the last bit.
  await page.getByRole("button", { name: "Keep in Base" }).click();
  await expect(page.getByText("1 edit not kept")).toBeHidden();
  await page.getByRole("button", { name: /^Run version \d+ again/ }).click();
  await expect(page.getByText(/^Same figures to the last bit/)).toBeVisible({ timeout: 120_000 });

  // Compare sizes of one buffer and keep one as a scenario.
  await page.getByRole("link", { name: /^Compare/ }).click();
  await page.getByRole("radio", { name: "By hand" }).click();
  await page.getByRole("textbox", { name: "Sizes, units" }).fill("2000 2400 2800");
  await page.getByRole("button", { name: "Run 3 sizes" }).click();
  await expect(page.getByRole("button", { name: "Share comparison" })).toBeVisible({ timeout: 180_000 });
  await expect(page.getByRole("img", { name: /^Fill rate by size/ })).toBeVisible();
  await page.getByRole("button", { name: /^Keep size 2.400 as a scenario/ }).click();
  await page.getByRole("textbox", { name: "Name" }).fill("Fewer laminations");
  await page.getByRole("dialog").getByRole("button", { name: "Save as scenario" }).click();
  await expect(page.getByRole("dialog")).toBeHidden();
  await expect(page.getByRole("heading", { name: "Fewer laminations" })).toBeVisible();

  // Send a link.
  await page.getByRole("button", { name: "Share link" }).click();
  await page.getByRole("button", { name: "Make a link" }).click();
  const address = await page.getByRole("textbox", { name: "Address of the link" }).inputValue();
  expect(address).toMatch(/\/s\/[\w-]{43}$/);
  expectQuiet();

  // The manager reads it on a phone, without signing in.
  const phone = await browser.newContext({ viewport: { width: 390, height: 844 } });
  const reader = await phone.newPage();
  const quiet = watch(reader);
  await reader.goto(address);
  await expect(reader.getByRole("heading", { name: /In 9 of 10 weeks we ship at least/ })).toBeVisible();
  await expect(reader.getByText("What the figures rest on")).toBeVisible();
  await expect(reader.getByText(/local working-time rules/).first()).toBeVisible();
  const overflow = await reader.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
  expect(overflow).toBeLessThanOrEqual(0);
  quiet.expectQuiet();

  // Revoked, it says so and shows no figures.
  await page.getByRole("button", { name: "Revoke" }).first().click();
  await page.getByRole("button", { name: "Revoke link" }).click();
  await expect(page.getByText("revoked", { exact: true }).first()).toBeVisible();
  await reader.reload();
  await expect(reader.getByRole("heading", { name: "This link was revoked" })).toBeVisible();
  await expect(reader.getByText(/weeks we ship/)).toHaveCount(0);
  await phone.close();
});

test("cancels a run: nothing arrives after it, and the next run works", async ({ page }) => {
  await signIn(page, "engineer");
  await makeLine(page, "Line to cancel", "The example line");
  await page.getByRole("textbox", { name: "Seed phrase" }).fill("another");
  await page.getByRole("textbox", { name: "Seed phrase" }).blur();
  await page.getByRole("button", { name: /^Run 10.000 weeks/ }).click();
  await page.getByRole("button", { name: /^Cancel run/ }).click();
  await expect(page.getByRole("button", { name: /^Run 10.000 weeks/ })).toBeVisible();
  await page.waitForTimeout(1_500);
  await expect(page.getByRole("button", { name: /^Run 10.000 weeks/ })).toBeVisible();
  await page.getByRole("button", { name: /^Run 10.000 weeks/ }).click();
  await expect(page.getByRole("button", { name: /^Run again/ })).toBeVisible({ timeout: 120_000 });
});
