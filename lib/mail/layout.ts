/** The frame of every mail: HTML and text of the same content, no pictures, no tracking. */

const entities: Record<string, string> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
};

export function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (character) => entities[character] ?? character);
}

export type Letter = {
  to: string;
  subject: string;
  heading: string;
  paragraphs: readonly string[];
  button?: { label: string; link: string };
  closing: string;
};

export function letter({ to, subject, heading, paragraphs, button, closing }: Letter) {
  const text = [
    heading,
    ...paragraphs,
    ...(button ? [`${button.label}:\n${button.link}`] : []),
    closing,
  ].join("\n\n");
  const body = paragraphs
    .map((paragraph) => `<p style="margin:0 0 16px">${escapeHtml(paragraph)}</p>`)
    .join("");
  const action = button
    ? `<p style="margin:24px 0"><a href="${escapeHtml(button.link)}" style="background:#7A1F2B;color:#ffffff;padding:14px 20px;border-radius:6px;text-decoration:none;font-weight:600;display:inline-block">${escapeHtml(button.label)}</a></p>
<p style="margin:0 0 16px;color:#5E564A;font-size:14px">Or open this address: <a href="${escapeHtml(button.link)}" style="color:#3F5F80;word-break:break-all">${escapeHtml(button.link)}</a></p>`
    : "";
  const html = `<!doctype html><html lang="en"><body style="margin:0;background:#FBF8F2;color:#211D18;font:16px/24px 'Public Sans',system-ui,sans-serif">
<div style="max-width:560px;margin:0 auto;padding:32px 20px"><h1 style="font:500 28px/32px Newsreader,Georgia,serif;margin:0 0 20px">${escapeHtml(heading)}</h1>
${body}${action}<p style="margin:24px 0 0;color:#5E564A;font-size:14px;border-top:1px solid #E2D9C8;padding-top:16px">${escapeHtml(closing)}</p></div></body></html>`;
  return { to, subject, text, html };
}
