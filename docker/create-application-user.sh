#!/bin/sh
# Run once by the database image on an empty data folder: the user the product works as, whose rights the migrations grant.
set -eu
mariadb --user=root --password="$MARIADB_ROOT_PASSWORD" <<SQL
CREATE USER IF NOT EXISTS 'app'@'%' IDENTIFIED BY '$DATABASE_APP_PASSWORD';
GRANT ALL PRIVILEGES ON ringtrue.* TO 'owner'@'%' WITH GRANT OPTION;
SQL
