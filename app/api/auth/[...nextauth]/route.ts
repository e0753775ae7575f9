import NextAuth from 'next-auth';
import type { NextRequest } from 'next/server';
import { authOptions } from '@/lib/server/auth';
import { AppError, STATUS } from '@/lib/server/errors';
import { checkSameOrigin } from '@/lib/server/same-origin';

type Context = { params: Promise<{ nextauth: string[] }> };

const answer = (request: NextRequest, context: Context): Promise<Response> => NextAuth(request, context, authOptions());

export const GET = answer;

/** Signing in and out: next-auth checks its own token as well; a foreign page does not get that far. */
export async function POST(request: NextRequest, context: Context): Promise<Response> {
  try {
    checkSameOrigin(request);
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    return Response.json({ error: error.code, message: error.message }, { status: STATUS[error.code] });
  }
  return answer(request, context);
}
