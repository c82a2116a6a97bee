// Fixed ports, so that the pages, the storage and the inbox are found by every journey.
export const PORTS = { application: 4310, s3: 4311, smtp: 4312, inbox: 4313 };
export const ORIGIN = `http://localhost:${PORTS.application}`;
export const STORAGE_ORIGIN = `http://localhost:${PORTS.s3}`;
export const INBOX = `http://localhost:${PORTS.inbox}`;
