/** E-mail: one message, one fact, one link; plain text beside the HTML. Sent over SMTP, wherever that points. */
import nodemailer from 'nodemailer';
import type { Logger } from 'pino';

export interface Message {
  readonly to: string;
  readonly subject: string;
  readonly lines: readonly string[];
  readonly link: string | null;
}

export interface Mailer {
  /** Hands a message to the mail server. A failure is logged and never stops what it tells of. */
  send(message: Message): Promise<void>;
}

export function smtpMailer(smtp_url: string, from: string, log: Logger): Mailer {
  const transport = nodemailer.createTransport(smtp_url);
  return {
    async send(message) {
      const text = [...message.lines, ...(message.link === null ? [] : [message.link])].join('\n\n');
      try {
        await transport.sendMail({
          from,
          to: message.to,
          subject: message.subject,
          text,
          html: html(message),
        });
      } catch (error) {
        log.error({ err: error }, 'an e-mail could not be sent');
      }
    },
  };
}

function html(message: Message): string {
  const paragraphs = message.lines.map((line) => `<p>${escapeHtml(line)}</p>`);
  const link =
    message.link === null
      ? ''
      : `<p><a href="${escapeHtml(message.link)}">${escapeHtml(message.link)}</a></p>`;
  return `<!doctype html><html lang="en"><body>${paragraphs.join('')}${link}</body></html>`;
}

/** Text that may stand in HTML. */
export function escapeHtml(text: string): string {
  return text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;');
}
