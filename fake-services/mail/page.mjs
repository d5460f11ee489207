const ESCAPES = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
const escapeHtml = (text) => String(text).replace(/[&<>"']/g, (letter) => ESCAPES[letter]);
const linked = (text) =>
  escapeHtml(text).replace(/https?:\/\/(?:(?!&lt;|&gt;|&quot;|&#39;)[^\s])+(?<![.,;:)])/g, '<a href="$&">$&</a>');

const STYLE = `
  body { margin: 0; background: #FBF7F0; color: #211A16; font: 17px/1.55 'Atkinson Hyperlegible Next', Verdana, sans-serif; }
  header { background: #3A2C22; color: #FBF7F0; padding: 14px 24px; border-bottom: 2px solid #1D4E63; }
  header a { color: #FBF7F0; font-weight: 600; text-decoration: none; }
  main { max-width: 920px; margin: 0 auto; padding: 24px; }
  h1 { font-family: Besley, Georgia, serif; font-size: 1.45rem; letter-spacing: -0.01em; margin: 0 0 16px; overflow-wrap: anywhere; }
  h2 { font-size: 1rem; margin: 28px 0 8px; }
  a { color: #1D4E63; }
  a:focus-visible, button:focus-visible, input:focus-visible, summary:focus-visible { outline: 3px solid #1D4E63; outline-offset: 2px; }
  form { display: flex; flex-wrap: wrap; gap: 8px; align-items: end; margin-bottom: 20px; }
  label { display: block; color: #5A4E45; }
  input, button { font: inherit; min-height: 44px; padding: 0 12px; border: 1px solid #85776A; background: #fff; color: inherit; }
  button { background: #1D4E63; color: #fff; border-color: #1D4E63; }
  ol { list-style: none; margin: 0; padding: 0; }
  li { border-top: 1px solid #85776A; padding: 12px 0; }
  li a { display: block; font-weight: 600; overflow-wrap: anywhere; }
  .quiet { color: #5A4E45; }
  pre { white-space: pre-wrap; overflow-wrap: anywhere; background: #fff; border: 1px solid #85776A; padding: 16px; margin: 0; font: inherit; }
  iframe { width: 100%; height: 640px; border: 1px solid #85776A; background: #fff; }
  dl { display: grid; grid-template-columns: max-content 1fr; gap: 4px 16px; margin: 0 0 16px; }
  dt { color: #5A4E45; } dd { margin: 0; overflow-wrap: anywhere; }`;

function page(title, body) {
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeHtml(title)}</title><style>${STYLE}</style></head>
<body><header><a href="/">Loamline post, on this machine only</a></header><main>${body}</main></body></html>`;
}

const when = (iso) => `<time datetime="${iso}">${iso.slice(0, 10)} ${iso.slice(11, 19)} UTC</time>`;
const names = (addresses) => escapeHtml(addresses.join(', '));

export function listPage(mails, to) {
  const items = mails.map(
    ({ id, subject, to: people, created_at }) =>
      `<li><a href="/mail/${id}">${escapeHtml(subject)}</a><span class="quiet">to ${names(people)}, ${when(created_at)}</span></li>`,
  );
  const nothing = to === '' ? 'No mail yet. What Loamline sends appears here.' : `No mail to ${escapeHtml(to)}.`;
  return page(
    'Mailbox',
    `<h1>Mailbox</h1>
<form method="get" action="/"><div><label for="to">Sent to</label><input id="to" name="to" value="${escapeHtml(to)}"></div>
<button>Show these</button></form>
${mails.length === 0 ? `<p>${nothing}</p>` : `<ol>${items.join('\n')}</ol>`}`,
  );
}

export function mailPage(mail) {
  const line = (name, value) => (value === '' ? '' : `<dt>${escapeHtml(name)}</dt><dd>${value}</dd>`);
  const headers = Object.entries(mail.headers).map(([name, value]) => line(name, linked(value)));
  const attachments = mail.attachments.map(
    ({ filename, bytes }, index) =>
      `<li><a href="/mail/${mail.id}/attachment/${index}" download>${escapeHtml(filename)}</a><span class="quiet">${bytes} bytes</span></li>`,
  );
  const section = (title, body) => (body === '' ? '' : `<h2>${title}</h2>${body}`);
  return page(
    mail.subject,
    `<h1>${escapeHtml(mail.subject)}</h1>
<dl>${line('From', escapeHtml(mail.from))}${line('To', names(mail.to))}${line('Copy', names([...mail.cc, ...mail.bcc]))}
${line('Reply to', names(mail.reply_to))}${line('Sent', when(mail.created_at))}</dl>
${section('Text', mail.text === null ? '' : `<pre data-part="text">${linked(mail.text)}</pre>`)}
${section('HTML', mail.html === null ? '' : `<iframe title="The mail as HTML" src="/mail/${mail.id}/html" sandbox="allow-popups allow-popups-to-escape-sandbox allow-top-navigation-by-user-activation"></iframe>`)}
${section('Attachments', attachments.length === 0 ? '' : `<ol>${attachments.join('')}</ol>`)}
${section('Headers', headers.length === 0 ? '' : `<dl>${headers.join('')}</dl>`)}
${section('Idempotency key', mail.idempotency_key === null ? '' : `<p class="quiet">${escapeHtml(mail.idempotency_key)}</p>`)}`,
  );
}

export const missingPage = () =>
  page(
    'No such mail',
    '<h1>No such mail</h1><p>It may belong to an earlier mailbox. <a href="/">See all mail</a>.</p>',
  );
