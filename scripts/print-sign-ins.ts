import { DEMO_ACCOUNTS } from '../shared/demo'

console.log('\nDemo sign-ins (invented people, this machine only):')
for (const { email, password, role, workroom } of DEMO_ACCOUNTS)
  console.log(`  ${email.padEnd(27)} ${password.padEnd(18)} ${role}, ${workroom}`)
console.log('')
