/** What a seat is called: "7", or "R1" for the first reserve. */
export const seatLabel = (number: number, isReserve: boolean, seatsPlanned: number): string => (isReserve ? `R${number - seatsPlanned}` : String(number));
