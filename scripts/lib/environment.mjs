/**
 * An environment without what steers a start, and without the marks of npm and Vitest: tests and builds depend on nothing of the
 * reader's own, and a build inside a test run is the same build.
 * @param {NodeJS.ProcessEnv} env
 * @returns {NodeJS.ProcessEnv}
 */
export function withoutOurs(env) {
  const ours = /^(HALFPLANE_|NUXT_|NITRO_|VITEST|npm_)|^(HOST|PORT|BASE_URL|DATABASE_URL|DATABASE_ADMIN_URL|SMTP_URL|NODE_ENV|NODE_OPTIONS|TEST|MODE|DEV|PROD|SSR)$/
  return Object.fromEntries(Object.entries(env).filter(([name]) => !ours.test(name)))
}
