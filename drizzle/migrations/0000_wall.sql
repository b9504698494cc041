-- The shop of the transaction; null when none is set. Setting it is the business of the server's doors.
create function current_shop() returns uuid
language sql stable
return nullif(current_setting('clamptide.shop', true), '')::uuid;
