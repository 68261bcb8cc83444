/** Runs once when a server starts, before it answers; not during a build. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { startServer } = await import("./lib/auth/start-server");
  await startServer();
}
