import { createHash, randomBytes } from "node:crypto";

/** 32 random bytes, base64url: 43 characters. */
export const makeToken = () => randomBytes(32).toString("base64url");

export const isToken = (text: string) => /^[A-Za-z0-9_-]{43}$/.test(text);

/** What is stored in place of a token: its SHA-256, hex. */
export const hashToken = (token: string) => createHash("sha256").update(token).digest("hex");
