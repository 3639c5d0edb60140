/** For the report of every method that is served in flights of all samples (see `planFlights`). */
export const FLIGHT_ORDERS = 'Williams squares, balanced for position and for what came before, dealt in whole squares and drawn anew for each flight';
