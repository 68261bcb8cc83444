import { fireEvent, render, screen, waitFor } from "@testing-library/react";
import { beforeEach, expect, it, vi } from "vitest";
import { SignInForm } from "@/app/(auth)/_components/sign-in-form";
import { signIn } from "@/lib/client/auth-client";
import { loadPage } from "@/lib/client/load-page";

vi.mock("@/lib/client/auth-client", () => ({ signIn: vi.fn() }));
vi.mock("@/lib/client/load-page", () => ({ loadPage: vi.fn() }));

const demo = [{ name: "Maren Oduya", email: "maren@larkfield.example", role: "owner", password: "typed-for-you" }];
const send = () => fireEvent.click(screen.getByRole("button", { name: "Sign in" }));

beforeEach(() => {
  vi.mocked(signIn).mockReset();
  vi.mocked(loadPage).mockReset();
});

it("asks for both before it asks the server", () => {
  render(<SignInForm next="/lines" demo={[]} />);
  send();
  expect(screen.getByRole("alert")).toHaveTextContent("Type your e-mail address and your password.");
  expect(signIn).not.toHaveBeenCalled();
});

it("fills in a demo account, shows why it was refused, and can be sent again", async () => {
  vi.mocked(signIn).mockResolvedValueOnce("Too many tries. Wait 40 seconds.").mockResolvedValue(null);
  render(<SignInForm next="/lines/a/sketch" demo={demo} />);
  fireEvent.click(screen.getByRole("button", { name: /Maren Oduya/ }));
  send();
  expect(await screen.findByText("Too many tries. Wait 40 seconds.")).toBeVisible();
  expect(loadPage).not.toHaveBeenCalled();
  send();
  await waitFor(() => expect(loadPage).toHaveBeenCalledExactlyOnceWith("/lines/a/sketch"));
  expect(signIn).toHaveBeenLastCalledWith("maren@larkfield.example", "typed-for-you");
});

it("shows no demo accounts where there are none", () => {
  render(<SignInForm next="/lines" demo={[]} />);
  expect(screen.queryByText(/Demo accounts/)).toBeNull();
});
