import { describe, expect, it } from "vitest";
import { escapeHtml, letter } from "./layout";
import { headerLine, mailAddress } from "./send";

describe("a header", () => {
  it("stays one line, whatever a name holds", () => {
    expect(headerLine("Larch\r\nBcc: all@example.org")).toBe("Larch Bcc: all@example.org");
    expect(headerLine("a\u2028b\u0000c\u0085d")).toBe("a b c d");
  });

  it.each([
    "ida@example.org\r\nBcc: all@example.org",
    "ida@example.org, all@example.org",
    "Ida <ida@example.org>",
    '"ida\\" <x@example.org>"@example.org',
    "ida",
    "",
  ])("names exactly one address: not %j", (address) => {
    expect(() => mailAddress(address)).toThrow(/not an e-mail address/);
  });

  it("takes ordinary addresses as they are", () => {
    for (const address of ["ida.farrow+shop@example.org", "o'neill@example.org", "märta@exämple.org"])
      expect(mailAddress(` ${address} `)).toEqual({ name: "", address });
  });
});

describe("a letter", () => {
  it("shows a name with markup as text in HTML", () => {
    const { html, text } = letter({
      to: "ida@example.org",
      subject: "Hello",
      heading: "Join <b>Larch</b> & Wren",
      paragraphs: ['"Ida" <script>alert(1)</script>'],
      button: { label: "Open", link: 'https://example.org/?a=1&b="2"' },
      closing: "Bye",
    });
    expect(html).not.toMatch(/<script|<b>/);
    expect(html).toContain("&lt;b&gt;Larch&lt;/b&gt; &amp; Wren");
    expect(html).toContain('href="https://example.org/?a=1&amp;b=&quot;2&quot;"');
    expect(text).toContain("Join <b>Larch</b> & Wren");
    expect(escapeHtml("'")).toBe("&#39;");
  });
});
