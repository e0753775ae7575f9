/** Reads RFC 4180 text by the letter: quotes, doubled quotes, commas and line ends inside them, CRLF between records. */
export function readCsv(text: string): string[][] {
  const records: string[][] = [[]];
  let field = '';
  let quoted = false;
  const body = text.replace(/^\ufeff/, '');
  for (let i = 0; i < body.length; i++) {
    const sign = body[i]!;
    if (quoted) {
      if (sign === '"' && body[i + 1] === '"') field += body[++i]!;
      else if (sign === '"') quoted = false;
      else field += sign;
    } else if (sign === '"' && field === '') quoted = true;
    else if (sign === ',') {
      records.at(-1)!.push(field);
      field = '';
    } else if (sign === '\r' && body[i + 1] === '\n') {
      records.at(-1)!.push(field);
      field = '';
      records.push([]);
      i++;
    } else if (sign === '"' || sign === '\n' || sign === '\r')
      throw new Error(`A ${JSON.stringify(sign)} stands loose at ${i}.`);
    else field += sign;
  }
  if (quoted || field !== '' || records.at(-1)!.length > 0) throw new Error('The file ends in the middle of a record.');
  records.pop();
  return records;
}
