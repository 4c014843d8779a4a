/** The page of the local mail stand-in: messages as safe text. There only while no real mail server is set. */
import type { RequestHandler } from 'express';
import type { LocalMail } from '../adapters/mail/local-mail.ts';
import { escapeHtml } from '../adapters/mail/mailer.ts';

export function mailPage(mail: LocalMail): RequestHandler {
  return (_request, response) => {
    const messages = mail
      .messages()
      .map(
        (message) =>
          `<article><h2>${escapeHtml(message.subject)}</h2><p>To ${escapeHtml(message.to)}, ${escapeHtml(message.received_at)}</p><pre>${linked(message.text)}</pre></article>`,
      );
    response
      .type('html')
      .send(
        `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>Mail kept here · Grainward</title></head><body><h1>Mail kept here</h1><p>No mail server is set, so nothing leaves this machine. Newest first.</p>${messages.join('') || '<p>No message yet.</p>'}</body></html>`,
      );
  };
}

/** Addresses of http in escaped text become links. */
function linked(text: string): string {
  return escapeHtml(text).replace(/https?:\/\/[^\s<&]+/g, (url) => `<a href="${url}">${url}</a>`);
}
