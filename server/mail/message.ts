/** A mail before it is sent: plain text only, so that it reads the same in every program. */
export interface MailMessage {
  /** Names the mail for good: its Message-ID and its file in the outbox. URL-safe base64. */
  stableId: string
  from: string
  to: { name: string, address: string }
  subject: string
  text: string
  /** When it was written, ms UTC. */
  at: number
}

// A line break in a header would let a piece's name add headers of its own.
const oneLine = (text: string) => text.replace(/\s+/g, ' ').trim()

/** The mail as nodemailer takes it, with the same Message-ID at every try. */
export function toNodemailer(message: MailMessage) {
  const domain = /@([^>\s]+)>?\s*$/.exec(message.from)?.[1] ?? 'localhost'
  return {
    messageId: `<${message.stableId}@${domain}>`,
    from: message.from,
    to: { name: oneLine(message.to.name), address: message.to.address },
    subject: oneLine(message.subject),
    text: message.text,
    date: new Date(message.at),
    headers: { 'Auto-Submitted': 'auto-generated' },
  }
}
