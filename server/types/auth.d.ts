declare module '#auth-utils' {
  interface SecureSessionData {
    /** Id of the session's row, and nothing else. */
    sid: string
  }
}

export {}
