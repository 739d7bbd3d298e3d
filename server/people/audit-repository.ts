import type { Knex } from 'knex';

/** Event names follow the OWASP Logging Vocabulary where it has one. */
export type AuditEvent =
  | 'authn_login_success'
  | 'authn_login_fail'
  | 'authn_login_lock'
  | 'authn_password_change'
  | 'authn_password_change_fail'
  | 'authz_fail'
  | 'malicious_csrf'
  | 'session_ended'
  | 'user_created'
  | 'user_disabled'
  | 'user_enabled'
  | 'shop_changed'
  | 'share_made'
  | 'share_revoked'
  | 'share_opened'
  | 'upload_validation'
  | 'run_accepted'
  | 'run_judged_again';

export type AuditEntry = {
  userId: string | null;
  event: AuditEvent;
  /** What it was done to: an id, or a method and path. Never what was typed as e-mail or password. */
  subject: string;
  details?: Record<string, string | number | boolean>;
};

export type Audit = (entry: AuditEntry) => Promise<void>;

/** The log is only ever added to. */
export function createAudit(db: Knex, now: () => Date): Audit {
  return async ({ userId, event, subject, details = {} }) => {
    await db('audit_log').insert({
      at_ms: now().getTime(),
      user_id: userId,
      event,
      subject,
      details: JSON.stringify(details),
    });
  };
}
