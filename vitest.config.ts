import { fileURLToPath } from 'node:url'
import { defineVitestProject } from '@nuxt/test-utils/config'
import { defineConfig } from 'vitest/config'

const root = fileURLToPath(new URL('.', import.meta.url))
const alias = { '~': root, '@': root, '#shared': `${root}shared` }
const deep = process.env.TEST_DEPTH === 'full'

export default defineConfig({
  test: {
    projects: [
      {
        resolve: { alias },
        test: {
          name: 'unit',
          include: ['tests/unit/**/*.spec.ts'],
          environment: 'node',
          setupFiles: ['tests/unit/setup.ts'],
          testTimeout: deep ? 900_000 : 120_000,
        },
      },
      {
        resolve: { alias },
        test: {
          name: 'external',
          include: ['tests/external/**/*.spec.ts'],
          environment: 'node',
          setupFiles: ['tests/unit/setup.ts'],
          testTimeout: deep ? 900_000 : 120_000,
        },
      },
      {
        resolve: { alias },
        test: {
          name: 'api',
          include: ['tests/api/**/*.spec.ts', 'tests/security/**/*.spec.ts'],
          environment: 'node',
          globalSetup: ['tests/api/setup.ts'],
          testTimeout: 60_000,
          hookTimeout: 120_000,
          fileParallelism: false,
        },
      },
      await defineVitestProject({
        test: {
          name: 'nuxt',
          include: ['tests/nuxt/**/*.spec.ts'],
          environment: 'nuxt',
          environmentOptions: { nuxt: { domEnvironment: 'happy-dom' } },
          testTimeout: 60_000,
        },
      }),
    ],
  },
})
