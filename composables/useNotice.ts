export interface Notice {
  readonly id: number
  readonly text: string
}

/** Short words about what has just happened, read aloud once; they leave by themselves. */
export function useNotice() {
  const notices = useState<readonly Notice[]>('notices', () => [])
  const dismiss = (id: number) => {
    notices.value = notices.value.filter((notice) => notice.id !== id)
  }
  const say = (text: string) => {
    const id = (notices.value.at(-1)?.id ?? 0) + 1
    notices.value = [...notices.value, { id, text }]
    if (import.meta.client) setTimeout(() => dismiss(id), 6000)
  }
  return { notices, say, dismiss }
}
