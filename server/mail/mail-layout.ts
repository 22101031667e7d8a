/** Escapes text for HTML, in content and in quoted attributes. */
export function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`);
}

export interface MailLayout {
  readonly title: string;
  /** HTML of the body, already escaped. */
  readonly bodyHtml: string;
  /** HTML of the lines below the caution, already escaped. */
  readonly footerHtml: string;
  readonly caution: string;
}

const colours = {
  stone: '#20262b', onStone: '#e9e6df', paper: '#f7f4ee', card: '#fffdf9', text: '#23282c',
  muted: '#566067', ochre: '#f4ead2', gold: '#a87b1e',
};

/**
 * The frame of every mail: tables and inline styles only, since mail readers know little else, and
 * no picture or font from anywhere but the registry.
 */
export function layOutMail({ title, bodyHtml, footerHtml, caution }: MailLayout): string {
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light">
<title>${escapeHtml(title)}</title></head>
<body style="margin:0;background:${colours.paper};color:${colours.text}">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0"
 style="background:${colours.paper}"><tr><td align="center">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0"
 style="max-width:600px;background:${colours.card};
 font:16px/1.5 'Atkinson Hyperlegible Next',Verdana,sans-serif;color:${colours.text}">
<tr><td style="background:${colours.stone};color:${colours.onStone};padding:18px 24px;
 font:600 20px Georgia,serif">${escapeHtml(title)}</td></tr>
<tr><td style="padding:22px 24px">${bodyHtml}
<p style="border-left:5px solid ${colours.gold};background:${colours.ochre};
 padding:12px 16px;margin:24px 0 0">${escapeHtml(caution)}</p>
</td></tr>
<tr><td style="padding:0 24px 24px;color:${colours.muted};font-size:14px">${footerHtml}</td></tr>
</table></td></tr></table></body></html>`;
}
