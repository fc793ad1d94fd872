import MarkdownIt from "markdown-it";
import { describe, expect, it } from "vitest";
import { escapeHtml, escapeMarkdown, symbolHtml, symbolText, visibleText } from "../../../kernel-ext/display";

const hostile = [
  '<script>alert("1")</script>',
  '" onmouseover="alert(1)',
  "' onload='alert(1)",
  "a & b &lt; c",
  "</td></table><img src=x onerror=alert(1)>",
  "[link](javascript:alert(1)) ![x](http://127.0.0.1/x.png)",
  "# heading | cell `code` *b* _i_ ~~s~~ $x$ <b>",
  "1. one",
];

describe("escapeHtml", () => {
  it("leaves no character that could open a tag, end an attribute or start an entity", () => {
    for (const text of hostile) {
      expect(escapeHtml(text)).not.toMatch(/[<>"']/);
      expect(escapeHtml(text)).not.toMatch(/&(?!amp;|lt;|gt;|quot;|#39;)/);
    }
  });

  it("shows a text again as it was", () => {
    // The five entities as HTML defines them (WHATWG HTML, named character references).
    const back = (html: string): string =>
      html
        .replaceAll("&lt;", "<")
        .replaceAll("&gt;", ">")
        .replaceAll("&quot;", '"')
        .replaceAll("&#39;", "'")
        .replaceAll("&amp;", "&");
    for (const text of hostile) expect(back(escapeHtml(text))).toBe(text);
  });
});

describe("visibleText", () => {
  it("shows terminal escapes, line ends and direction marks instead of obeying them", () => {
    // Control pictures: Unicode 15, block U+2400: ESC is U+241B, BEL U+2407, DEL U+2421.
    expect(visibleText("a\u001b[31mb\u0007\u007f")).toBe("a\u241b[31mb\u2407\u2421");
    expect(visibleText("a\r\nb\nc\td")).toBe("a b c d");
    expect(visibleText("abc\u202edcba")).toBe("abc\ufffddcba");
    expect(visibleText("z\u00fcrich \u03b8 \u4e2d")).toBe("z\u00fcrich \u03b8 \u4e2d");
  });
});

describe("escapeMarkdown", () => {
  it("gives back the text and nothing else when a Markdown reader has read it", () => {
    // markdown-it, a CommonMark reader that knows tables besides, is the judge.
    const reader = new MarkdownIt({ html: true, linkify: false });
    for (const text of hostile) {
      const html = reader.render(escapeMarkdown(text));
      const inner = /^<p>(.*)<\/p>\n$/.exec(html)?.[1];
      expect(inner, html).toBeDefined();
      expect(inner).not.toContain("<");
      expect(
        (inner as string)
          .replaceAll("&lt;", "<")
          .replaceAll("&gt;", ">")
          .replaceAll("&quot;", '"')
          .replaceAll("&amp;", "&"),
      ).toBe(text);
    }
  });
});

describe("symbols", () => {
  it("become Greek letters, subscripts and superscripts", () => {
    expect(symbolText("100 theta_*")).toBe("100 \u03b8_*");
    expect(symbolText("Omega_m h^2")).toBe("\u03a9_m h\u00b2");
    expect(symbolText("Mpc^-1")).toBe("Mpc\u207b\u00b9");
    expect(symbolHtml("theta_*")).toBe("\u03b8<sub>*</sub>");
    expect(symbolHtml("r_s(z_*)")).toBe("r<sub>s</sub>(z<sub>*</sub>)");
    expect(symbolHtml("r_{drag}")).toBe("r<sub>drag</sub>");
  });

  it("leave words alone in which a Greek name only occurs", () => {
    expect(symbolText("beta-tau spiral eta2")).toBe("\u03b2-\u03c4 spiral \u03b72");
    expect(symbolText("pie number")).toBe("pie number");
    expect(symbolText("constructor toString")).toBe("constructor toString");
  });

  it("are escaped like everything else", () => {
    for (const text of hostile) expect(symbolHtml(text).replace(/<\/?su[bp]>/g, "")).not.toMatch(/[<>"']/);
  });
});
