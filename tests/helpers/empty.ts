// Stands in for 'server-only', which throws under plain Node.
export {};
