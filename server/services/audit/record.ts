import type { Queryable } from '../../database/client'
import { auditLog } from '../../database/schema'

export type AuditEntry = {
  /** Who did it; null for a machine. */
  personId: string | null
  /** What was done, as thing and verb: `session.start`, `payment.late`. */
  action: string
  /** The id or reference of what it was done to. */
  object: string
  /** A sentence for a colleague; no secrets. */
  detail: string
}

/** Writes to the append-only audit trail, in the transaction of the act. */
export async function recordAudit(tx: Queryable, entry: AuditEntry): Promise<void> {
  await tx.insert(auditLog).values(entry)
}
