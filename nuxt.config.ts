import { fileURLToPath } from 'node:url'
import { build } from 'esbuild'

const buildDir = process.env.TENTERFRAME_BUILD_DIR ?? '.nuxt'
const outputDir = process.env.TENTERFRAME_OUTPUT_DIR ?? '.output'

/** A thread of the server as text: a bundler of the server cannot follow `new Worker`, so the thread is bundled by itself. */
async function bundledWorker(entry: string): Promise<string> {
  const { outputFiles } = await build({
    entryPoints: [fileURLToPath(new URL(entry, import.meta.url))],
    bundle: true,
    write: false,
    platform: 'node',
    format: 'cjs',
    target: 'node20',
    minify: true,
  })
  // As base64, because the server's own bundler replaces words in what it takes for code.
  return `export default Buffer.from('${Buffer.from(outputFiles[0]!.contents).toString('base64')}', 'base64').toString()`
}

export default defineNuxtConfig({
  compatibilityDate: '2026-01-01',
  srcDir: '.',
  buildDir,
  telemetry: false,
  devtools: { enabled: false },
  modules: ['@nuxtjs/tailwindcss', '@pinia/nuxt', 'nuxt-auth-utils', 'nuxt-security', '@nuxt/eslint'],
  components: [{ path: '~/components', pathPrefix: false }],
  pinia: { storesDirs: ['./stores/**'] },
  tailwindcss: { configPath: 'tailwind.config.ts', cssPath: '~/assets/css/main.css', viewer: false },
  css: [
    '@fontsource/inter/latin-400.css',
    '@fontsource/inter/latin-600.css',
    '@fontsource/inter/latin-ext-400.css',
    '@fontsource/inter/latin-ext-600.css',
  ],
  app: {
    head: {
      title: 'Tenterframe',
      htmlAttrs: { lang: 'en' },
      meta: [
        { name: 'viewport', content: 'width=device-width, initial-scale=1' },
        { name: 'description', content: 'Workbench for stretch garments with structure' },
        { name: 'color-scheme', content: 'light dark' },
      ],
      link: [{ rel: 'icon', type: 'image/svg+xml', href: '/mark.svg' }],
    },
  },
  runtimeConfig: {
    databaseUrl: '',
    demo: '',
    loginLimit: '8',
    files: { driver: 'folder', folder: '.data/files', endpoint: '', region: '', bucket: '', accessKeyId: '', secretAccessKey: '' },
    session: {
      name: 'tenterframe',
      password: '',
      maxAge: 60 * 60 * 24 * 14,
      cookie: { sameSite: 'lax', secure: true },
    },
  },
  security: {
    rateLimiter: false,
    headers: {
      strictTransportSecurity: false,
      crossOriginEmbedderPolicy: false,
      contentSecurityPolicy: {
        'default-src': ["'self'"],
        'script-src': ["'self'", "'nonce-{{nonce}}'", "'strict-dynamic'"],
        'style-src': ["'self'", "'unsafe-inline'"],
        'img-src': ["'self'", 'data:', 'blob:'],
        'font-src': ["'self'", 'data:'],
        'worker-src': ["'self'"],
        'object-src': ["'none'"],
        'frame-ancestors': ["'none'"],
        'form-action': ["'self'"],
        'upgrade-insecure-requests': false,
      },
    },
    corsHandler: false,
    requestSizeLimiter: { maxRequestSizeInBytes: 4_000_000, maxUploadFileRequestInBytes: 4_000_000 },
    xssValidator: false,
  },
  // What takes a file streams it and cuts it at its own limit.
  routeRules: {
    '/api/tests/*/photo': { security: { requestSizeLimiter: false } },
    '/api/solve/run': { security: { requestSizeLimiter: false } },
  },
  nitro: {
    output: { dir: outputDir },
    virtual: { '#machine-file-worker': () => bundledWorker('server/workers/machine-file.ts') },
    experimental: { asyncContext: true },
  },
  vite: {
    optimizeDeps: {
      include: ['vee-validate', '@vee-validate/zod', 'zod', 'konva', 'konva/lib/Core', 'papaparse', 'vue-konva', 'clipper2-ts', 'nnls'],
    },
  },
  typescript: {
    strict: true,
    tsConfig: { compilerOptions: { noUncheckedIndexedAccess: true } },
  },
})
