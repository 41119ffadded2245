/** Installs the packages the lock file asks for, when they are missing or older. */
export function ensurePackages(): void
/** Builds the server when a source is newer than the last build. */
export function ensureBuild(): void
/** The path of an installed Chromium, or null. */
export function findBrowser(): string | null
