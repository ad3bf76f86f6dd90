-- The administrator comes in over the socket alone, which only the owner of the data folder can reach.
delete from mysql.global_priv where User = 'root' and Host <> 'localhost';
