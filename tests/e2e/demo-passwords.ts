/** Shown on the demo's own sign-in page. */
export const demoPasswords = {
  engineer: { name: /Ines Kallweit/, password: "forebay-engineer" },
  manager: { name: /Tomas Berg/, password: "forebay-manager" },
  owner: { name: /Maren Oduya/, password: "forebay-owner" },
  viewer: { name: /Pavel Orsk/, password: "forebay-viewer" },
} as const;
