import prettier from 'eslint-config-prettier'
import withNuxt from './.nuxt/eslint.config.mjs'

/** Rooms of the domain in the order in which imports may go: a room imports only those before it (and cautions). */
const rooms = ['units', 'geometry', 'textile', 'body', 'draft', 'structure', 'garment', 'grade', 'making', 'fit', 'document', 'output']
const mayImport = {
  units: [],
  cautions: ['units'],
  geometry: ['units'],
  textile: ['units', 'geometry', 'cautions'],
  body: ['units', 'geometry', 'cautions'],
  draft: ['units', 'geometry', 'textile', 'body', 'cautions'],
  structure: ['units', 'geometry', 'textile', 'body', 'draft', 'cautions'],
  document: ['units', 'geometry', 'textile', 'body', 'draft', 'structure', 'cautions'],
  garment: ['units', 'geometry', 'textile', 'body', 'draft', 'structure', 'document', 'cautions'],
  grade: ['units', 'geometry', 'textile', 'body', 'draft', 'structure', 'document', 'garment', 'cautions'],
  making: ['units', 'geometry', 'textile', 'body', 'draft', 'structure', 'document', 'garment', 'cautions'],
  fit: ['units', 'geometry', 'textile', 'body', 'draft', 'structure', 'document', 'garment', 'cautions'],
  output: [...rooms.filter((room) => room !== 'output'), 'cautions'],
}

const forbidden = (room, allowed) => {
  const group = [...rooms, 'cautions'].filter((other) => other !== room && !allowed.includes(other)).map((other) => `**/${other}/**`)
  return group.length > 0 ? [{ group, message: `domain/${room} may not import this room.` }] : []
}

const domainRules = Object.entries(mayImport).map(([room, allowed]) => ({
  files: [`shared/domain/${room}/**/*.ts`],
  rules: {
    'no-restricted-imports': [
      'error',
      {
        patterns: [
          ...forbidden(room, allowed),
          { group: ['vue', 'vue/*', 'h3', 'node:*', '#imports', '~/*', '@/*', 'konva', 'pg', 'kysely'], message: 'The domain is pure.' },
        ],
      },
    ],
    'no-restricted-globals': ['error', 'window', 'document', 'console', 'process', 'fetch', 'localStorage'],
    'no-restricted-properties': [
      'error',
      { object: 'Math', property: 'random', message: 'The domain is deterministic.' },
      { object: 'Date', property: 'now', message: 'Take a clock or a date as input.' },
    ],
  },
}))

export default withNuxt(
  { ignores: ['.output*/**', '.data/**', 'node_modules/**', '.nuxt*/**', 'shots/**', 'test-results/**'] },
  {
    rules: {
      'no-console': ['error', { allow: ['warn', 'error'] }],
      '@typescript-eslint/no-explicit-any': 'error',
      'vue/multi-word-component-names': 'off',
      'vue/html-self-closing': 'off',
    },
  },
  { files: ['scripts/**', 'tests/**'], rules: { 'no-console': 'off' } },
  { files: ['migrations/**'], rules: { '@typescript-eslint/no-explicit-any': 'off' } },
  ...domainRules,
  prettier,
)
