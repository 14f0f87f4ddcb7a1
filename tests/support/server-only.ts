// Stands in for the marker package that keeps server modules out of browser bundles; tests run on the server side.
export {};
