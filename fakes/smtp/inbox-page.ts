import type { ReceivedMail } from "./start-fake-smtp";

const escape = (text: string) => text.replace(/[<>&"']/g, (letter) => `&#${letter.charCodeAt(0)};`);

/** Addresses in the text can be followed; everything else is shown as it was written. */
const linked = (text: string) =>
  escape(text).replace(/https?:\/\/[^\s<&]+/g, (address) => `<a href="${address}">${address}</a>`);

function page(title: string, body: string): string {
  return `<!doctype html><html lang="en"><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escape(title)}</title><style>
:root{color-scheme:light dark;font:16px/1.5 system-ui,sans-serif}
body{max-width:46rem;margin:2rem auto;padding:0 1rem}
ul{list-style:none;padding:0}li{border-bottom:1px solid #8888;padding:.75rem 0}
a{min-height:44px}pre{white-space:pre-wrap;font:inherit;border:1px solid #8888;padding:1rem}
input,button{font:inherit;min-height:44px;padding:0 .75rem}
</style><body><main>${body}</main></body></html>`;
}

/** Newest first. */
export function inboxPage(mails: readonly ReceivedMail[], to: string): string {
  const rows = mails.map(
    ({ id, subject, to: recipient, date }) =>
      `<li><a href="/${id}">${escape(subject || "(no subject)")}</a><br>to ${escape(recipient)}, ${escape(date)}</li>`,
  );
  return page(
    "Inbox",
    `<h1>Inbox</h1><form><label>To <input name="to" value="${escape(to)}"></label> <button>Show</button></form>
${rows.length > 0 ? `<ul>${rows.join("")}</ul>` : "<p>No mail.</p>"}
<form method="post" action="/empty"><button>Delete all mail</button></form>`,
  );
}

export function messagePage(mail: ReceivedMail): string {
  return page(
    mail.subject,
    `<p><a href="/">Inbox</a></p><h1>${escape(mail.subject)}</h1>
<p>From ${escape(mail.from)}<br>To ${escape(mail.to)}<br>${escape(mail.date)}</p>
<pre>${linked(mail.text)}</pre>${mail.html ? `<h2>HTML part</h2><pre>${escape(mail.html)}</pre>` : ""}`,
  );
}
