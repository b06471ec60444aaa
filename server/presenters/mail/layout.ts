export interface MailContent {
  title: string;
  paragraphs: string[];
  /** Things in a row, each under a line of its own. */
  items?: { heading: string; lines: string[] }[];
  /** The one thing to do, as a button; its address also stands in the plain text. */
  action?: { label: string; url: string };
  /** What comes after the button. */
  notes?: string[];
}

/** Makes text safe to stand in HTML, also inside a quoted attribute. */
export function escapeHtml(text: string): string {
  return text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;').replace(/'/g, '&#39;');
}

/** One plain mail in both forms. Nothing in it is loaded from elsewhere, so it looks the same everywhere and tells nobody that it was opened. */
export function mailLayout({ title, paragraphs, items = [], action, notes = [] }: MailContent): { text: string; html: string } {
  const text = [
    title, ...paragraphs, ...items.map((item) => [item.heading, ...item.lines.map((line) => `  ${line}`)].join('\n')), ...(action ? [`${action.label}:\n${action.url}`] : []), ...notes, 'Dapple',
  ].join('\n\n');
  const button = action
    ? `<p style="margin:24px 0"><a href="${escapeHtml(action.url)}" style="background:#0b5d4b;color:#ffffff;padding:14px 22px;border-radius:12px;text-decoration:none;font-weight:bold;display:inline-block">${escapeHtml(action.label)}</a></p>`
    : '';
  const html = `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><title>${escapeHtml(title)}</title></head>
<body style="margin:0;background:#edf2eb;font-family:sans-serif;font-size:16px;line-height:1.5;color:#14231d"><div style="max-width:560px;margin:0 auto;padding:24px;background:#ffffff">
<h1 style="font-size:22px;margin:0 0 16px">${escapeHtml(title)}</h1>
${paragraphs.map((paragraph) => `<p style="margin:0 0 14px">${escapeHtml(paragraph)}</p>`).join('\n')}
${items.map((item) => `<p style="margin:0 0 14px"><strong>${escapeHtml(item.heading)}</strong>${item.lines.map((line) => `<br>${escapeHtml(line)}`).join('')}</p>`).join('\n')}
${button}${notes.map((note) => `<p style="margin:0 0 14px">${escapeHtml(note)}</p>`).join('\n')}
<p style="margin:24px 0 0;color:#4c5f56">Dapple</p></div></body></html>`;
  return { text: `${text}\n`, html };
}
