/** An address that its holder knows again and a stranger cannot write to: i•••@tarnbeck.example. */
export function maskEmail(email: string): string {
  const at = email.lastIndexOf('@')
  return `${[...email.slice(0, at)][0] ?? ''}•••${email.slice(at)}`
}
