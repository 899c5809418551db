// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { MoneyCell, QuantityCell } from "@/components/quote/cell-input";

afterEach(cleanup);

function type(cell: HTMLElement, text: string) {
  cell.focus();
  fireEvent.change(cell, { target: { value: text } });
}

describe("a cell of the quote", () => {
  it("keeps what it held on Escape, and takes what was typed on Enter", () => {
    const onCommit = vi.fn();
    render(<MoneyCell label="Each" value={14200} currency="USD" locale="en-US" onCommit={onCommit} />);
    const cell = screen.getByLabelText("Each");
    type(cell, "99");
    fireEvent.keyDown(cell, { key: "Escape" });
    expect(onCommit).not.toHaveBeenCalled();
    type(cell, "99");
    fireEvent.keyDown(cell, { key: "Enter" });
    expect(onCommit).toHaveBeenCalledExactlyOnceWith(9900);
  });

  it("says what it did not take", () => {
    const onCommit = vi.fn();
    render(<QuantityCell label="Quantity" milli={1000} isHours onCommit={onCommit} />);
    const cell = screen.getByLabelText("Quantity");
    type(cell, "abc");
    fireEvent.blur(cell);
    expect(onCommit).not.toHaveBeenCalled();
    expect(screen.getByRole("alert").textContent).toContain("“abc” is not a number.");
  });
});
