-- Take a suction pipe back.
DELETE FROM suction_pipes WHERE pipe = :pipe;
