import { expect, test } from "@playwright/test";
import { expectAccessible, lineIdOf, makeLine, openLine, signIn, watch } from "./helpers";

test("draws a line of one's own from nothing by keyboard and forms until it runs", async ({ page }) => {
  const { expectQuiet } = watch(page);
  await signIn(page, "engineer");
  await makeLine(page, "Hub motor line", "An empty sheet");
  await expect(page.getByText("Nothing is drawn yet")).toBeVisible();

  const add = async (what: string) => {
    await page.getByRole("button", { name: "Add", exact: true }).click();
    await page.getByRole("menuitem", { name: new RegExp(`^${what}`) }).click();
  };
  const connect = async (to: string) => {
    await page.getByRole("button", { name: "Connect to" }).click();
    await page
      .getByRole("dialog")
      .getByRole("button", { name: new RegExp(`^${to}`) })
      .click();
  };
  const choose = (name: RegExp) => page.getByRole("group", { name }).click();

  await add("Customer");
  await page.getByRole("textbox", { name: "Mean", exact: true }).fill("400");
  await page.getByRole("textbox", { name: "Standard deviation" }).fill("40");
  await add("Buffer");
  await page.getByRole("textbox", { name: "Places" }).fill("150");
  await connect("Customer 1");
  await add("Station");
  await page.getByRole("textbox", { name: "Cycle, mean" }).fill("9,5");
  await connect("Buffer 1");
  await add("Supplier");
  await page.getByRole("textbox", { name: "Lead time, quoted" }).fill("10");
  // A supplier to a station puts a purchased buffer between, sized by the mean use.
  await connect("Station 1");
  await choose(/^Supplier 1 stock, purchased buffer, order up to 1.200/);
  await expect(page.getByRole("textbox", { name: "Order-up-to level" })).toHaveValue("1200");

  await expect(page.getByText(/^Checked: no faults/)).toBeVisible();
  await expect(page.getByText(/live reading/).first()).toBeVisible();

  // Delete the station with its links, and bring it back in one step.
  await choose(/^Station 1, station/);
  await page.getByRole("group", { name: /^Station 1, station/ }).press("Delete");
  await expect(page.getByText(/faults?/).first()).toBeVisible();
  await page.keyboard.press("Control+z");
  await expect(page.getByText(/^Checked: no faults/)).toBeVisible();

  // What is shown as saved is there after a reload.
  await expect(page.getByText(/^Saved \d\d:\d\d/)).toBeVisible();
  await page.reload();
  await expect(page.getByRole("group", { name: /^Supplier 1 stock/ })).toBeVisible();
  expectQuiet();
});

test("a line with faults lists them and points to the nodes", async ({ page }) => {
  await signIn(page, "engineer");
  await openLine(page, "Battery pack line");
  await expect(page.getByText(/This line cannot run yet/)).toBeVisible();
  await expect(page.getByRole("button", { name: /^Run/ }).first()).toBeDisabled();
});

test("pastes a block of cells into the table as one step of undo", async ({ page, context }) => {
  await context.grantPermissions(["clipboard-read", "clipboard-write"]);
  await signIn(page, "engineer");
  await makeLine(page, "Line to paste into", "The example line");
  await page.getByRole("radio", { name: "Table" }).click();
  const cell = page.getByRole("textbox", { name: "Lamination stacks: Size, units" });
  const below = page.getByRole("textbox", { name: "Wire kits: Size, units" });
  const [was, wasBelow] = [await cell.inputValue(), await below.inputValue()];
  await page.evaluate(() => navigator.clipboard.writeText("3.100\t\t4,25\n1 900\t\tabc"));
  await cell.click();
  await page.keyboard.press("Control+v");
  await expect(cell).toHaveValue("3100");
  await expect(below).toHaveValue("1900");
  await expect(page.getByText("1 pasted cell was not used")).toBeVisible();
  await page.getByRole("button", { name: /^Undo/ }).click();
  await expect(cell).toHaveValue(was);
  await expect(below).toHaveValue(wasBelow);
});

test("two people editing one scenario: the second save is asked, not lost", async ({ page, browser }) => {
  await signIn(page, "engineer");
  await makeLine(page, "Line of two", "The example line");
  const other = await browser.newContext();
  const owner = await other.newPage();
  await signIn(owner, "owner");
  await openLine(owner, "Line of two");
  const sizeOf = (who: typeof page) => who.getByRole("textbox", { name: "Order-up-to level" });
  for (const who of [page, owner]) await who.getByRole("group", { name: /^Housings, purchased buffer/ }).click();
  await sizeOf(page).fill("2500");
  await expect(page.getByText(/^Saved \d\d:\d\d/)).toBeVisible();
  await page.waitForTimeout(1_500);
  await sizeOf(owner).fill("2600");
  await expect(owner.getByRole("dialog", { name: /Which edits shall stand/ })).toBeVisible();
  await owner.getByRole("button", { name: "Take theirs" }).click();
  await expect(sizeOf(owner)).toHaveValue("2500");
  await other.close();
});

test("a viewer reads everything and is offered nothing that a viewer may not do", async ({ page }) => {
  await signIn(page, "viewer");
  await expect(page.getByRole("button", { name: "New line" })).toHaveCount(0);
  await openLine(page);
  await expect(page.getByRole("button", { name: "Add", exact: true })).toHaveCount(0);
  await expect(page.getByRole("button", { name: "Share link" })).toHaveCount(0);
  const id = lineIdOf(page);
  const answer = await page.request.get(`/api/lines/${id}/shares`);
  expect(answer.status()).toBeLessThan(404);
});

for (const { name, path, width } of [
  { name: "sign-in", path: "/sign-in", width: 1440 },
  { name: "sign-up", path: "/sign-up", width: 390 },
  { name: "missing page", path: "/no-such-page", width: 390 },
]) {
  test(`${name} is accessible and quiet`, async ({ page }) => {
    const { expectQuiet } = watch(page, [/404/]);
    await page.setViewportSize({ width, height: 844 });
    await page.goto(path);
    await expect(page.getByRole("heading", { level: 1 })).toBeVisible();
    await expectAccessible(page);
    expectQuiet();
  });
}

test("the views of a line are accessible, light and dark, wide and narrow", async ({ page }) => {
  const { expectQuiet } = watch(page);
  await signIn(page, "engineer");
  await expectAccessible(page);
  await openLine(page);
  const id = lineIdOf(page);
  for (const scheme of ["light", "dark"] as const) {
    await page.emulateMedia({ colorScheme: scheme });
    for (const path of ["sketch", "sketch?view=table", "readings", "compare", "sizing"]) {
      await page.goto(`/lines/${id}/${path}`);
      await expect(page.getByText(/weeks we ship at least/).first()).toBeVisible();
      await expectAccessible(page);
    }
  }
  await page.setViewportSize({ width: 390, height: 844 });
  for (const path of ["sketch", "readings", "compare", "sizing"]) {
    await page.goto(`/lines/${id}/${path}`);
    await expect(page.getByText(/weeks we ship at least/).first()).toBeVisible();
    await expectAccessible(page);
    const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    expect(overflow, `${path} is wider than the phone`).toBeLessThanOrEqual(0);
  }
  expectQuiet();
});
