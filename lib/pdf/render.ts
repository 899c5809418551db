import { renderToBuffer } from "@react-pdf/renderer";
import { createElement, type FunctionComponent } from "react";
import { loadFonts } from "./fonts";
import { formatsFor } from "./format";
import type { Writing } from "./frame";
import { Invoice } from "./invoice";
import type { InvoiceModel, PaperBase, QuoteModel, ReleaseModel } from "./models";
import { Quote } from "./quote";
import { Release } from "./release";
import { wordsFor } from "./words";

async function render<Model extends PaperBase>(
  Paper: FunctionComponent<{ paper: Model } & Writing>,
  paper: Model,
): Promise<Uint8Array> {
  await loadFonts();
  const words = wordsFor(paper.language);
  const formats = formatsFor(paper, words);
  // the component's root is a Document, which the library's types ask to see by name
  const element = createElement(Paper, { paper, words, formats }) as unknown as Parameters<typeof renderToBuffer>[0];
  return new Uint8Array(await renderToBuffer(element));
}

/** The invoice as PDF. The same model always gives the same bytes. */
export const renderInvoice = (paper: InvoiceModel): Promise<Uint8Array> => render(Invoice, paper);

/** The estimate or quotation as PDF, with boxes to tick and a line to sign. */
export const renderQuote = (paper: QuoteModel): Promise<Uint8Array> => render(Quote, paper);

/** The paper of a vehicle that left unrepaired. */
export const renderRelease = (paper: ReleaseModel): Promise<Uint8Array> => render(Release, paper);
