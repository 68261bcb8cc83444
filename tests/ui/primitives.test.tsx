import { fireEvent, render, screen, waitFor } from "@testing-library/react";
import { useState } from "react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { NameDialog } from "@/components/line/name-dialog";
import { chooseTheme, readTheme } from "@/components/layout/theme";
import { ConfirmDialog } from "@/components/ui/confirm-dialog";
import { NumberField } from "@/components/ui/number-field";
import { Pick } from "@/components/ui/pick";
import { noAnswer } from "@/lib/client/no-answer";

describe("NumberField", () => {
  function type(text: string, props: { factor?: number; start?: number | null } = {}) {
    const seen: (number | null)[] = [];
    function Held() {
      const [value, setValue] = useState<number | null>(props.start ?? null);
      return (
        <NumberField
          label="Scrap"
          unit="%"
          factor={props.factor}
          step={1}
          value={value}
          onChange={(next) => {
            seen.push(next);
            setValue(next);
          }}
        />
      );
    }
    render(<Held />);
    const field = screen.getByLabelText<HTMLInputElement>("Scrap");
    fireEvent.change(field, { target: { value: text } });
    return { field, seen };
  }

  it("takes a decimal comma and leaves it as typed while typing", () => {
    const { field, seen } = type("1,5", { factor: 100 });
    expect(seen).toEqual([0.015]);
    expect(field).toHaveValue("1,5");
    fireEvent.blur(field);
    expect(field).toHaveValue("1.5");
  });

  it("is null when emptied", () => expect(type("", { start: 4 }).seen).toEqual([null]));

  it("keeps what is no number on screen, says so and changes nothing", () => {
    const { field, seen } = type("abc", { start: 4 });
    fireEvent.blur(field);
    expect(seen).toEqual([]);
    expect(field).toHaveValue("abc");
    expect(field).toBeInvalid();
    expect(field).toHaveAccessibleDescription(/is not a number\.$/);
  });

  it("steps by arrow key and button without what binary fractions add", () => {
    const { field, seen } = type("6", { factor: 100 });
    fireEvent.keyDown(field, { key: "ArrowUp" });
    fireEvent.click(screen.getByLabelText("Scrap: less"));
    expect(seen).toEqual([0.06, 0.07, 0.06]);
  });
});

it("says beside a pick what is wrong with it", () => {
  render(
    <Pick isField label="Shape" value="a" options={[{ value: "a", label: "A" }]} onChange={() => {}} error="No." />,
  );
  expect(screen.getByRole("combobox")).toHaveAccessibleDescription("No.");
});

describe("dialogs whose call fails", () => {
  it("keeps the question open and says why; forgets it when asked again", async () => {
    function Held() {
      const [isOpen, setOpen] = useState(true);
      return (
        <>
          <button onClick={() => setOpen(true)}>Again</button>
          <ConfirmDialog
            open={isOpen}
            onClose={() => setOpen(false)}
            title="Delete it?"
            description="It is gone then."
            action="Delete line"
            onConfirm={() => Promise.reject(new TypeError("Failed to fetch"))}
          />
        </>
      );
    }
    render(<Held />);
    fireEvent.click(screen.getByText("Delete line"));
    expect(await screen.findByText(noAnswer)).toBeVisible();
    expect(screen.getByText("Delete line")).toBeEnabled();
    fireEvent.click(screen.getByText("Leave it"));
    await waitFor(() => expect(screen.queryByText("Delete line")).toBeNull());
    fireEvent.click(screen.getByText("Again"));
    expect(await screen.findByText("Delete line")).toBeVisible();
    expect(screen.queryByText(noAnswer)).toBeNull();
  });

  it("leaves the name typed and can be sent again", async () => {
    const submit = vi.fn().mockRejectedValueOnce(new TypeError("Failed to fetch")).mockResolvedValue({ ok: true });
    const onClose = vi.fn();
    render(
      <NameDialog isOpen title="Rename" action="Rename line" initialName="Old" onClose={onClose} submit={submit} />,
    );
    fireEvent.change(screen.getByLabelText("Name"), { target: { value: " New " } });
    fireEvent.click(screen.getByText("Rename line"));
    expect(await screen.findByText(noAnswer)).toBeVisible();
    fireEvent.click(screen.getByText("Rename line"));
    await waitFor(() => expect(onClose).toHaveBeenCalledOnce());
    expect(submit.mock.calls).toEqual([["New"], ["New"]]);
  });
});

describe("theme", () => {
  afterEach(() => chooseTheme("system"));

  it("follows the system unless a known one was chosen", () => {
    expect(readTheme("dark")).toBe("dark");
    expect(readTheme("sepia")).toBe("system");
    expect(readTheme(undefined)).toBe("system");
  });

  it("shows at once and is remembered", () => {
    chooseTheme("dark");
    expect(document.documentElement).toHaveAttribute("data-theme", "dark");
    expect(document.cookie).toContain("theme=dark");
    chooseTheme("system");
    expect(document.documentElement).not.toHaveAttribute("data-theme");
  });
});
