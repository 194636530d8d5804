import { describe, expect, it } from 'vitest';
import { inlineCode, paragraphOf, paragraphsOf } from '../../../src/http/pages/description.ts';
import { html } from '../../../src/http/pages/markup.ts';

describe('markup', () => {
  it('escapes what is inserted, in text and in attributes, and only once', () => {
    const evil = `<img src=x onerror='a("b")'> & co`;
    const inner = html`<i>${evil}</i>`;
    expect(html`<p title="${evil}">${inner}${[1, '<']}</p>`.text).toBe(
      '<p title="&lt;img src=x onerror=&#39;a(&quot;b&quot;)&#39;&gt; &amp; co">' +
        '<i>&lt;img src=x onerror=&#39;a(&quot;b&quot;)&#39;&gt; &amp; co</i>1&lt;</p>',
    );
  });
});

describe('a description in Markdown', () => {
  const description = 'First,\nin two lines.\n\n**Bounds.** `bound` is a <limit>.\n\n**Not a title** `x`\n';

  it('is read paragraph by paragraph', () => {
    expect(paragraphsOf(description)).toEqual([
      { title: '', text: 'First, in two lines.' },
      { title: 'Bounds', text: '`bound` is a <limit>.' },
      { title: 'Not a title', text: '`x`' },
    ]);
  });

  it('gives its code as HTML, escaped', () => {
    expect(inlineCode(paragraphOf(description, 'Bounds')).text).toBe(
      '<code>bound</code> is a &lt;limit&gt;.',
    );
  });

  it('is not taken without a paragraph that the page must show', () => {
    expect(() => paragraphOf(description, 'Caution')).toThrow('has no paragraph "Caution"');
  });
});
