import { spawn } from 'node:child_process'
import { existsSync } from 'node:fs'
import { createServer } from 'node:net'
import { resolve } from 'node:path'

export interface RunningServer {
  readonly url: string
  readonly stop: () => Promise<void>
}

function freePort(): Promise<number> {
  return new Promise((found) => {
    const probe = createServer()
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address()
      probe.close(() => found(typeof address === 'object' && address ? address.port : 0))
    })
  })
}

/** Starts the built server on a port, a free one unless told, and waits until it is ready. */
export async function startServer(env: Readonly<Record<string, string>>, fixedPort?: number): Promise<RunningServer> {
  const entry = resolve(process.env.TENTERFRAME_OUTPUT_DIR ?? '.output', 'server/index.mjs')
  if (!existsSync(entry)) throw new Error(`There is no built server at ${entry}: run the build first.`)
  const port = fixedPort ?? (await freePort())
  const url = `http://127.0.0.1:${port}`
  const child = spawn(process.execPath, [entry], {
    env: {
      ...process.env,
      NUXT_DEMO: '',
      TENTERFRAME_CHECK_ANSWERS: '1',
      ...env,
      HOST: '127.0.0.1',
      NITRO_HOST: '127.0.0.1',
      PORT: String(port),
      NITRO_PORT: String(port),
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  let said = ''
  child.stdout.on('data', (chunk) => (said += chunk))
  child.stderr.on('data', (chunk) => {
    said += chunk
    if (process.env.TENTERFRAME_SHOW_SERVER) process.stderr.write(chunk)
  })
  const ended = new Promise<void>((done) => child.once('exit', () => done()))
  for (let tries = 0; ; tries++) {
    const ready = await fetch(`${url}/api/health`).then(
      (answer) => answer.ok,
      () => false,
    )
    if (ready) break
    if (child.exitCode !== null || tries > 150) throw new Error(`The server did not start.\n${said}`)
    await new Promise((wait) => setTimeout(wait, 100))
  }
  return {
    url,
    stop: async () => {
      child.kill('SIGTERM')
      await Promise.race([ended, new Promise((wait) => setTimeout(wait, 3000).unref())])
      if (child.exitCode === null) child.kill('SIGKILL')
    },
  }
}
