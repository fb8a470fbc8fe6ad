import { threadForNitro } from './server/compute/thread-plugin'
import { writeRouteList } from './server/access/route-list'
import { registerErrorHandler } from './server/errors/register'

/** Tests and benches build into folders of their own, so that they can run beside a running product. */
const build = process.env.HALFPLANE_BUILD_DIR

export default defineNuxtConfig({
  modules: ['@nuxt/eslint', '@nuxtjs/tailwindcss', '@pinia/nuxt', 'nuxt-auth-utils'],
  ssr: true,
  devtools: { enabled: false },
  app: {
    head: {
      htmlAttrs: { lang: 'en-GB' },
      title: 'Halfplane',
      meta: [
        { name: 'viewport', content: 'width=device-width, initial-scale=1' },
        { name: 'description', content: 'Trade studies of modulation: error rates from geometry, set against the link budget.' },
      ],
      link: [{ rel: 'icon', type: 'image/svg+xml', href: '/mark.svg' }],
    },
  },
  css: ['~/assets/css/sheet.css'],
  runtimeConfig: {
    session: {
      password: '',
      name: 'halfplane',
      maxAge: 60 * 60 * 24 * 14,
      // Secure is decided when the cookie is set, from BASE_URL.
      cookie: { secure: false, sameSite: 'lax', httpOnly: true },
    },
  },
  ...(build ? { buildDir: `${build}/nuxt` } : {}),
  future: { compatibilityVersion: 4 },
  experimental: { appManifest: false },
  compatibilityDate: '2026-01-01',
  nitro: {
    ...(build ? { output: { dir: `${build}/output` } } : {}),
    compressPublicAssets: true,
    // The core decides close cases with big integers.
    esbuild: { options: { target: 'es2022' } },
    // ExcelJS reaches these through a conditional export that the tracing of files does not follow.
    externals: {
      traceInclude: ['async-function', 'async-generator-function', 'generator-function'].map(name => `node_modules/${name}/require.mjs`),
    },
    serverAssets: [{ baseName: 'migrations', dir: '../drizzle' }],
    rollupConfig: { plugins: [threadForNitro()] },
  },
  vite: { build: { assetsInlineLimit: 0 } },
  typescript: { strict: true },
  telemetry: false,
  hooks: {
    // The hints would have every page fetch the grid and the charts; what a page needs is still preloaded.
    'build:manifest': (manifest) => {
      for (const resource of Object.values(manifest)) resource.prefetch = false
    },
    'nitro:init': (nitro) => {
      writeRouteList(nitro)
      registerErrorHandler(nitro)
    },
  },
  eslint: { config: { stylistic: true } },
})
