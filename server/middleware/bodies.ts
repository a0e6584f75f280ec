import express, { type RequestHandler } from 'express';

const ofStrangers = express.json({ limit: '100kb' });
/** as many drawn outlines as one request may bring, gathered where there was no connection */
const ofPeople = express.json({ limit: '16mb' });

/** Reads JSON bodies. A stranger has nothing to say that is longer than a form. */
export const bodies: RequestHandler = (req, res, next) => {
  (req.user ? ofPeople : ofStrangers)(req, res, next);
};
