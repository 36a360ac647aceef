import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'

const [folder, broken] = process.argv.slice(2)
const total = { passed: 0, failed: 0, skipped: 0 }

for (const name of ['unit', 'nuxt', 'api']) {
  const file = join(folder, `${name}.json`)
  if (!existsSync(file)) {
    console.log(`no report: ${name}`)
    total.failed += 1
    continue
  }
  const report = JSON.parse(readFileSync(file, 'utf8'))
  total.passed += report.numPassedTests
  total.failed +=
    report.numFailedTests + (report.testResults ?? []).filter((one) => one.status === 'failed' && one.assertionResults.length === 0).length
  total.skipped += report.numPendingTests + (report.numTodoTests ?? 0)
}

const browser = join(folder, 'browser.json')
if (existsSync(browser)) {
  const { stats, errors } = JSON.parse(readFileSync(browser, 'utf8'))
  total.passed += stats.expected
  total.failed += stats.unexpected + stats.flaky + (stats.expected + stats.unexpected === 0 ? errors.length : 0)
  total.skipped += stats.skipped
} else {
  console.log('no report: browser')
  total.failed += 1
}

if (broken === '1' && total.failed === 0) total.failed = 1
console.log(`${total.passed} passed, ${total.failed} failed, ${total.skipped} skipped`)
process.exit(total.failed > 0 || broken === '1' ? 1 : 0)
