import { expect, test } from "@playwright/test";
import { expectAccessible, makeLine, signIn, watch } from "./helpers";

test("an engineer finds the cheapest set, keeps it, holds it against today's and opens a bad week", async ({
  page,
}) => {
  const { expectQuiet } = watch(page);
  await signIn(page, "engineer");
  await makeLine(page, "Line to size", "The example line");

  // Fewer weeks than one would decide on, so that the search is short.
  await page.getByRole("textbox", { name: "Weeks" }).fill("1500");
  await page.getByRole("textbox", { name: "Weeks" }).blur();
  await page.getByRole("button", { name: /^Run 1.500 weeks/ }).click();
  await expect(page.getByRole("button", { name: /^Run again/ })).toBeVisible({ timeout: 120_000 });
  await page.getByRole("button", { name: "Keep in Base" }).click();
  await expect(page.getByText(/edits? not kept/)).toBeHidden();

  await page.getByRole("link", { name: "Sizing", exact: true }).click();
  await page.getByRole("combobox", { name: /^Target/ }).click();
  await page.getByRole("option", { name: /^90/ }).click();
  await page.getByRole("button", { name: "Search sizes" }).first().click();
  await expect(page.getByRole("heading", { name: /^Sizes for 10/ })).toBeVisible({ timeout: 180_000 });
  await expect(page.getByText(/unseen weeks \(seed phrase/)).toBeVisible();

  // The rest of the terrace can be left for later, and gone on with.
  await page.getByRole("button", { name: "Cancel search" }).click();
  await expect(page.getByText("Search stopped")).toBeVisible();
  await page.getByRole("button", { name: "Go on searching" }).click();
  await expect(page.getByText(/^Textbook sizes \(/)).toBeVisible({ timeout: 120_000 });
  await page.getByRole("button", { name: "Cancel search" }).click();
  await expectAccessible(page);

  await page.getByRole("button", { name: "Keep as a scenario" }).click();
  await page.getByRole("dialog").getByRole("button", { name: "Save as scenario" }).click();
  await expect(page.getByRole("dialog")).toBeHidden();

  await page.getByRole("button", { name: /^Work out the needs/ }).click();
  await expect(page.getByRole("img", { name: /^Need of .* over the week/ })).toBeVisible({ timeout: 60_000 });

  // Held against today's sizes over the same weeks.
  await page.getByRole("link", { name: /^Compare/ }).click();
  await page.getByRole("button", { name: "Run on the same weeks" }).click();
  await expect(page.getByText(/^At the edge of the worst tenth of weeks/)).toBeVisible({ timeout: 60_000 });

  // Another number than a size, and two at once.
  await page.getByRole("combobox", { name: /^Of/ }).click();
  await page.getByRole("option", { name: /^Whole line/ }).click();
  await page.getByRole("button", { name: "Vary a second number as well" }).click();
  await page.getByRole("radio", { name: "By hand" }).click();
  await page.getByRole("textbox", { name: "Values, %", exact: true }).fill("95 100 105");
  await page.getByRole("textbox", { name: "at up to 6 values, units" }).fill("2000, 2800");
  await page.getByRole("button", { name: "Run 6 values" }).click();
  await expect(page.getByText("6 of 6 pairs run")).toBeVisible({ timeout: 60_000 });
  await expectAccessible(page);

  // Why one bad week went wrong.
  await page.getByRole("link", { name: "Readings", exact: true }).click();
  await page.getByRole("button", { name: "Open this week" }).click();
  await expect(page.getByText(/^In week \d+ of replication/).first()).toBeVisible({ timeout: 60_000 });
  await expectAccessible(page);
  expectQuiet();
});
