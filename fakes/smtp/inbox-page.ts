import type { ReceivedMail } from "./mail-files";

const escape = (text: string) => text.replace(/[<>&"']/g, (letter) => `&#${letter.charCodeAt(0)};`);

/** The text as it was written, with its web addresses as links. */
function linked(text: string): string {
  // Every second piece is an address; a full stop or bracket after it belongs to the sentence.
  return text
    .split(/(https?:\/\/[^\s<>"]*[^\s<>".,;:!?'()[\]])/)
    .map((piece, at) => (at % 2 === 1 ? `<a href="${escape(piece)}">${escape(piece)}</a>` : escape(piece)))
    .join("");
}

const STYLE = `
:root{color-scheme:light dark;--paper:#edf0ec;--sheet:#fbfcfa;--line:#a9b3ab;--ink:#1c211f;--soft:#4f5652;--enamel:#1d3f35;--link:#2d5a4c}
@media(prefers-color-scheme:dark){:root{--paper:#161b19;--sheet:#1f2623;--line:#5d6a63;--ink:#e8ede9;--soft:#b4beb8;--link:#a9d3c2}}
*{box-sizing:border-box}
body{margin:0;font:1rem/1.5 system-ui,sans-serif;color:var(--ink);background:var(--paper)}
header{background:var(--enamel);color:#eef3ef;padding:.75rem 1rem;font-weight:600}
main{max-width:46rem;margin:0 auto;padding:1rem}
h1{font-size:1.5rem;line-height:1.2;overflow-wrap:anywhere}h2{font-size:1.125rem}
a{color:var(--link);text-underline-offset:3px;overflow-wrap:anywhere}
:focus-visible{outline:3px solid var(--link);outline-offset:2px}
ul{list-style:none;margin:1rem 0;padding:0;background:var(--sheet);border:1px solid var(--line);border-radius:4px}
li{padding:.5rem 1rem}li+li{border-top:1px solid var(--line)}
li a,nav a{display:inline-block;min-height:44px;padding:.6rem 0;font-weight:600}
li p,dd{margin:0;color:var(--soft);overflow-wrap:anywhere}
dl{display:grid;grid-template-columns:auto 1fr;gap:.25rem 1rem}dt{font-weight:600}dd{color:inherit}
pre{white-space:pre-wrap;overflow-wrap:anywhere;font:inherit;background:var(--sheet);border:1px solid var(--line);border-radius:4px;padding:1rem}
form{display:flex;flex-wrap:wrap;gap:.5rem;align-items:end}label{display:grid;flex:1 1 14rem;font-weight:600}
input,button{font:inherit;min-height:44px;padding:0 .75rem;color:inherit;background:var(--sheet);border:1px solid var(--line);border-radius:4px}
button{font-weight:600;border-color:currentColor}
`;

function page(title: string, body: string): string {
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escape(title)}</title><style>${STYLE}</style></head>
<body><header>Mail of this machine</header><main>${body}</main></body></html>`;
}

/** "2026-03-01 12:00:05 UTC" in a time element. */
function time(date: string): string {
  return `<time datetime="${escape(date)}">${escape(date.slice(0, 19).replace("T", " "))} UTC</time>`;
}

const subjectOf = (mail: ReceivedMail) => mail.subject || "(no subject)";

/** The list, as it is given: newest first. */
export function inboxPage(mails: readonly ReceivedMail[], to: string): string {
  const rows = mails.map(
    (mail) =>
      `<li><a href="/${escape(mail.id)}">${escape(subjectOf(mail))}</a><p>to ${escape(mail.to)}, ${time(mail.date)}</p></li>`,
  );
  const none = to === "" ? "No mail has arrived yet." : `No mail to “${to}”.`;
  return page(
    "Inbox",
    `<h1>Inbox</h1>
<form method="get" action="/"><label>Recipient <input name="to" type="search" value="${escape(to)}" autocomplete="off"></label><button>Show</button></form>
${rows.length > 0 ? `<ul>${rows.join("\n")}</ul>` : `<p>${escape(none)}</p>`}
<form method="post" action="/empty"><button>Delete all mail</button></form>`,
  );
}

/** One mail; its HTML part is shown as text. */
export function messagePage(mail: ReceivedMail): string {
  return page(
    subjectOf(mail),
    `<nav aria-label="Mail"><a href="/">Inbox</a></nav><h1>${escape(subjectOf(mail))}</h1>
<dl><dt>From</dt><dd>${escape(mail.from)}</dd><dt>To</dt><dd>${escape(mail.to)}</dd><dt>Arrived</dt><dd>${time(mail.date)}</dd></dl>
<h2>Text</h2>${mail.text ? `<pre>${linked(mail.text)}</pre>` : "<p>This mail has no text part.</p>"}
<h2>HTML</h2>${mail.html ? `<pre>${escape(mail.html)}</pre>` : "<p>This mail has no HTML part.</p>"}
<p><a href="/${escape(mail.id)}.eml">The mail as it came</a></p>`,
  );
}

/** For an address that leads to no mail. */
export function missingPage(): string {
  return page(
    "No such mail",
    `<h1>No such mail</h1><p>It may have been deleted. Go to the <a href="/">inbox</a>.</p>`,
  );
}
