'use client';

export const PrintButton = () => <button type="button" className="btn btn-main" onClick={() => window.print()}>Print</button>;
